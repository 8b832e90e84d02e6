import { AsciiWriter } from './ascii-writer.js';
import { type DeflateBlocks, type Packed, packText, zip, zipEntry } from './zip.js';

/**
 * 3MF core specification 1.3. A bed's model part is put together from objects that were written and compressed elsewhere, perhaps
 * in another thread: each is a run of whole deflate blocks, and such runs can be joined.
 */
export interface PackedObject extends Packed {
  readonly id: number;
  readonly name: string;
  readonly partNumber: string;
  /** PNG of the object; null: none. */
  readonly icon: Uint8Array | null;
}

/** One object of a bed and its place: the object is turned by 0 or 90 degrees about z, then moved. */
export interface BuildItem {
  readonly object: PackedObject;
  readonly turned: boolean;
  /** Where the object's origin goes, mm. */
  readonly move: readonly [number, number];
}

const CORE = 'http://schemas.microsoft.com/3dmanufacturing/core/2015/02';
const MODEL_PATH = '3D/3dmodel.model';
const MODEL_RELATIONS = '3D/_rels/3dmodel.model.rels';
const THUMBNAIL = 'http://schemas.openxmlformats.org/package/2006/relationships/metadata/thumbnail';

/** A mesh as a named object with its part number. @param id unique on the bed, at least 1; @param icon PNG of the object, or null */
export function packObject(
  positions: Float32Array,
  triangles: Uint32Array,
  id: number,
  name: string,
  partNumber: string,
  deflate: DeflateBlocks,
  icon: Uint8Array | null = null,
): PackedObject {
  // Names may hold any character: the head is joined on as text.
  const head =
    `<object id="${id}" type="model"${icon ? ` thumbnail="/${iconPath(id)}"` : ''} name="${escapeXml(name)}" ` +
    `partnumber="${escapeXml(partNumber)}"><mesh><vertices>\n`;
  const body = new AsciiWriter();
  for (let i = 0; i < positions.length; i += 3)
    body
      .text('<vertex x="')
      .decimal(positions[i]!)
      .text('" y="')
      .decimal(positions[i + 1]!)
      .text('" z="')
      .decimal(positions[i + 2]!)
      .text('"/>\n');
  body.text('</vertices><triangles>\n');
  for (let i = 0; i < triangles.length; i += 3)
    body
      .text('<triangle v1="')
      .whole(triangles[i]!)
      .text('" v2="')
      .whole(triangles[i + 1]!)
      .text('" v3="')
      .whole(triangles[i + 2]!)
      .text('"/>\n');
  body.text('</triangles></mesh></object>\n');
  return { id, name, partNumber, icon, ...packText(joined(head, body.done()), deflate) };
}

function joined(head: string, body: Uint8Array): Uint8Array {
  const start = new TextEncoder().encode(head);
  const out = new Uint8Array(start.length + body.length);
  out.set(start);
  out.set(body, start.length);
  return out;
}

const iconPath = (id: number): string => `3D/Thumbnails/object-${id}.png`;

/** A nanometre: finer than single precision from 16 mm up, and than any two vertices of a cleaned mesh. */
const say = (v: number): string => String(Math.round(v * 1e6) / 1e6 + 0);

const escapeXml = (s: string): string =>
  s.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;').replaceAll('"', '&quot;');

/**
 * A 3MF file of one bed.
 *
 * @param title the file's title; @param date of issue or null; @param thumbnail a PNG of the bed, or null
 */
export function writeThreeMf(
  items: readonly BuildItem[],
  title: string,
  date: string | null,
  thumbnail: Uint8Array | null,
  deflate: DeflateBlocks,
): Uint8Array {
  const head =
    '<?xml version="1.0" encoding="UTF-8"?>\n' +
    `<model unit="millimeter" xml:lang="en" xmlns="${CORE}">\n` +
    `<metadata name="Title">${escapeXml(title)}</metadata>\n` +
    '<metadata name="Application">strutwright</metadata>\n' +
    (date === null ? '' : `<metadata name="CreationDate">${escapeXml(date)}</metadata>\n`) +
    '<resources>\n';
  const tail =
    '</resources>\n<build>\n' +
    items
      .map(({ object, turned, move }) => {
        // Row vectors times this 3 x 3 and a move: x' = x m00 + y m10 + z m20 + m30.
        const turn = turned ? '0 1 0 -1 0 0 0 0 1' : '1 0 0 0 1 0 0 0 1';
        return (
          `<item objectid="${object.id}" transform="${turn} ${say(move[0])} ${say(move[1])} 0" ` +
          `partnumber="${escapeXml(object.partNumber)}"/>\n`
        );
      })
      .join('') +
    '</build>\n</model>\n';
  const types =
    '<?xml version="1.0" encoding="UTF-8"?>\n' +
    '<Types xmlns="http://schemas.openxmlformats.org/package/2006/content-types">' +
    '<Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/>' +
    '<Default Extension="model" ContentType="application/vnd.ms-package.3dmanufacturing-3dmodel+xml"/>' +
    '<Default Extension="png" ContentType="image/png"/></Types>\n';
  const icons = [...new Map(items.map(({ object }) => [object.id, object])).values()].filter((o) => o.icon !== null);
  const relations = relationships([
    ['http://schemas.microsoft.com/3dmanufacturing/2013/01/3dmodel', MODEL_PATH],
    ...(thumbnail ? [[THUMBNAIL, 'Metadata/thumbnail.png'] as const] : []),
  ]);
  const part = (path: string, content: string | Uint8Array) => zipEntry(path, [packText(content, deflate)]);
  return zip([
    part('[Content_Types].xml', types),
    part('_rels/.rels', relations),
    zipEntry(MODEL_PATH, [packText(head, deflate), ...items.map((i) => i.object), packText(tail, deflate)]),
    // The pictures of objects belong to the model part, that of the whole to the package (core specification, 2.1 and 6.1).
    ...(icons.length > 0
      ? [part(MODEL_RELATIONS, relationships(icons.map(({ id }) => [THUMBNAIL, iconPath(id)])))]
      : []),
    ...icons.map(({ id, icon }) => part(iconPath(id), icon!)),
    ...(thumbnail ? [part('Metadata/thumbnail.png', thumbnail)] : []),
  ]);
}

const relationships = (targets: readonly (readonly [type: string, path: string])[]): string =>
  '<?xml version="1.0" encoding="UTF-8"?>\n' +
  '<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships">' +
  targets.map(([type, path], i) => `<Relationship Id="rel${i}" Type="${type}" Target="/${path}"/>`).join('') +
  '</Relationships>\n';
