import type { PackRecords } from '../records.js';
import { pageData } from './page-data.js';
import { PAGE_STYLE } from './page-style.js';

/**
 * assembly.html: the order of building as one file that opens from disk, with no address in it. `script` is the bundled
 * page code, `key` a digest of what the page shows.
 */
export function assemblyHtml(records: PackRecords, script: string, key: string): Uint8Array {
  const data = pageData(records, key);
  const steps = data.steps
    .map(
      (s, i) =>
        `<li value="${i + 1}"><b>${text(s.say)}</b> ${text([...strutWords(s.struts.map((e) => ({ mark: data.struts[e.index]!.mark, how: e.how }))), ...s.notes].join(' '))}</li>`,
    )
    .join('\n');
  const found = data.findings
    .map((f) => `<li><b>${text(LEVEL[f.level] ?? f.level)}</b> ${text(f.message)}</li>`)
    .join('\n');
  const html = `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta http-equiv="Content-Security-Policy" content="default-src 'none'; script-src 'unsafe-inline'; style-src 'unsafe-inline'; img-src data: blob:; base-uri 'none'; form-action 'none'">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>Building ${text(data.title)}, revision ${text(data.revision)}</title>
<style>${PAGE_STYLE}</style>
</head>
<body>
<header>
<div class="name"><h1>${text(data.title)}</h1><p>Order of building, revision ${text(data.revision)}${data.date ? `, ${text(data.date)}` : ''}. <span id="ticked"></span></p></div>
<form id="search" role="search"><label for="mark">Find a mark</label> <input id="mark" type="search" autocomplete="off" spellcheck="false"><button type="submit">Find</button><span id="search-answer" role="status"></span></form>
<div class="tools" role="group" aria-label="What is shown">
<button id="labels" aria-pressed="true">Marks</button><button id="forces" aria-pressed="false">Forces</button><button id="findings" aria-pressed="false">Findings</button><button id="home">Whole view</button><button id="print">Print</button>
</div>
</header>
${data.hold.length > 0 ? `<p class="hold" role="alert"><b>On hold.</b> ${text(data.hold.join(' '))}</p>` : ''}
<main>
<section id="stage" aria-label="The truss">
<canvas id="truss" tabindex="0" role="img" aria-label="The truss as it stands after this step; the parts of the step are listed beside it. Keys a, d, w, s turn it."></canvas>
<canvas id="marks" aria-hidden="true"></canvas><canvas id="printed" aria-hidden="true"></canvas>
<p id="no-picture">This browser draws no 3D picture. The steps and lists work without it; assembly.pdf has the pictures.</p>
<p id="legend" hidden><span class="pull"></span> T pulls <span class="push"></span> C pushes: the wider, the more</p>
</section>
<section id="card" aria-label="Step">
<p id="count" role="status"></p>
<p id="say" aria-live="polite"></p>
<ul id="notes"></ul>
<ul id="parts" aria-label="Parts of this step"></ul>
<div id="picked" aria-live="polite" hidden></div>
<div class="go"><button id="back">Back</button><button id="next">Next</button></div>
<div class="slide"><button id="play" aria-pressed="false">Play</button><input id="slider" type="range" min="1" step="1" aria-label="Step"></div>
<p id="next-say"></p>
<p class="caution">${text(data.caution)}</p>
</section>
<section id="found" aria-label="Findings" hidden><h2>Findings</h2><ul>${found || '<li>None.</li>'}</ul></section>
</main>
<section id="all" aria-label="All steps"><h2>All steps</h2><ol>
${steps}
</ol></section>
<script type="application/json" id="pack">${json(data)}</script>
<script>${script.replaceAll('</script', '<\\/script')}</script>
</body>
</html>
`;
  return new TextEncoder().encode(html);
}

/** Struts of a step with how they get in, said once where it is the same for all. */
function strutWords(struts: readonly { readonly mark: string; readonly how: string }[]): string[] {
  if (struts.length === 0) return [];
  const how = struts[0]!.how;
  const same = struts.length > 1 && struts.every((s) => s.how === how);
  const list = struts.map((s) => (s.how && !same ? `${s.mark} (${s.how})` : s.mark)).join(', ');
  return [`${list}.`, ...(same && how ? [`All of them: ${how}.`] : [])];
}

const LEVEL: Readonly<Record<string, string>> = { stop: 'Stop.', warn: 'Warning.', note: 'Note.' };

const ENTITY: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};
const text = (s: string): string => s.replace(/[&<>"']/g, (c) => ENTITY[c]!);

/** JSON that cannot end its script element, whatever the titles hold. */
const json = (value: unknown): string =>
  JSON.stringify(value).replaceAll('<', '\\u003c').replaceAll('\u2028', '\\u2028').replaceAll('\u2029', '\\u2029');
