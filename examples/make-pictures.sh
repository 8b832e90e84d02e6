#!/usr/bin/env bash
# Makes the README's pictures from the example's pack: needs poppler-utils and librsvg2-bin.
set -euo pipefail
cd "$(dirname "$0")/.."
pack=$(mktemp -d)/pack
node bin/strutwright.js make examples/lantern -o "$pack" >/dev/null || true
mkdir -p examples/pictures
pdftoppm -r 60 -png -f 2 -l 2 -singlefile "$pack/forces/force-sheets.pdf" examples/pictures/force-sheet
node tests/tools/render-mesh.mjs examples/pictures/node.png "$pack/nodes/stl/A02.stl" "$pack/nodes/stl/B03.stl"
pdftoppm -r 60 -png -f 1 -l 1 -singlefile "$pack/panels/sheets.pdf" examples/pictures/sheet
