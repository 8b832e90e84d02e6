// Writes the jobs of the templates, each a full job with every key explained, from the built program: npm run build first.
// What stands here is what a template sets otherwise than the program; the rest are the program's own values.
import { readFileSync, writeFileSync } from 'node:fs';
import { jobSchema } from '../dist/model/job/index.js';
import { jsonSchemas } from '../dist/model/json-schemas.js';

const SCHEMA = jsonSchemas()['job.schema.json'];

const TEMPLATES = {
  'table-model': {
    about: [
      'A model for a table, of beech dowels, printed hubs and clear acrylic.',
      'Any truss file of yours may stand under "truss". Print the fit gauge first (nodes/gauge.pdf says how), then enter the clearance that fits.',
    ],
    job: {
      title: 'Table model',
      date: '2026-12-01',
      use: 'table',
      struts: { section: 'beech-8' },
      assembly: { closing: 'give' },
      saw: { step_mm: 0.5, endFloat_mm: 0.75, kerf_mm: 2.4, endTrim_mm: 5 },
      stock: {
        bars: [{ section: 'beech-8', length_mm: 1000, price: 2.2 }],
        leastOffcut_mm: 150,
        currency: 'EUR',
      },
      printers: [{ name: 'desk printer', width_mm: 210, depth_mm: 210, height_mm: 210 }],
      sheets: [{ name: 'acrylic 1000 x 600', width_mm: 1000, height_mm: 600 }],
    },
  },
  'table-model-us': {
    about: [
      'A model for a table, of birch dowels from an American shop, printed hubs and clear acrylic.',
      'Any truss file of yours may stand under "truss". Papers are in inches; keys say their own unit.',
    ],
    job: {
      title: 'Table model',
      date: '2026-12-01',
      use: 'table',
      struts: { section: 'birch-5/16in' },
      assembly: { closing: 'give' },
      saw: { step_mm: 0.79375, endFloat_mm: 0.75, kerf_mm: 2.4, endTrim_mm: 6.35 },
      stock: {
        bars: [
          { section: 'birch-5/16in', length_mm: 914.4, price: 1.5, name: '5/16 x 36 in' },
          { section: 'birch-5/16in', length_mm: 1219.2, price: 1.9, name: '5/16 x 48 in' },
        ],
        leastOffcut_mm: 152.4,
        currency: 'USD',
      },
      printers: [{ name: 'desk printer', width_mm: 210, depth_mm: 210, height_mm: 210 }],
      sheets: [
        { name: 'acrylic 24 x 48 in', width_mm: 1219.2, height_mm: 609.6, price: 45 },
        { name: 'acrylic 12 x 24 in', width_mm: 609.6, height_mm: 304.8, price: 14 },
      ],
      output: { paper: 'Letter', units: 'US', fractions: true, projection: 'third-angle', labels: 'Letter-3x10' },
    },
  },
  'garden-pavilion': {
    about: [
      'A pavilion for a garden, of glued timber with bolted spigots and panels that may move outdoors.',
      'It is a beginning, not a design: loads, anchorage and materials are those of your place, and a licensed engineer decides.',
      'It stays on hold until you have tested a printed connector and entered its strength under "materials".',
    ],
    job: {
      title: 'Garden pavilion',
      date: '2026-12-01',
      use: 'outdoor',
      forces: { source: 'analysis' },
      loads: {
        cases: [
          { name: 'snow', kind: 'snow', pressure_kN_per_m2: 0.5 },
          { name: 'wind pressure', kind: 'wind', pressure_kN_per_m2: 0.4, direction: 'normal' },
          { name: 'wind suction', kind: 'wind', pressure_kN_per_m2: -0.4, direction: 'normal' },
        ],
        category: 'H',
        anchorage: { kind: 'anchors', capacity_N: 2000 },
      },
      analysis: { secondOrder: true },
      strength: { serviceClass: 3 },
      struts: { section: 'GL24h-60x60' },
      saw: { step_mm: 1, endFloat_mm: 1, kerf_mm: 3.2, endTrim_mm: 20 },
      stock: { bars: [{ section: 'GL24h-60x60', length_mm: 4000, price: 24 }], leastOffcut_mm: 400, currency: 'EUR' },
      nodes: { system: 'spigot', systems: FEET(), process: 'powder', material: 'PA12-powder', joint: 'pinned', pin_mm: 10, depthFactor: 2.8 },
      printers: [{ name: 'powder bed of a print shop', width_mm: 680, depth_mm: 370, height_mm: 560 }],
      panels: { seating: 'over', thickness_mm: 6, holdBy: 'clips', corner: 'round', notFlat: 'flag' },
      sheets: [{ name: 'acrylic 3050 x 2030', width_mm: 3050, height_mm: 2030, price: 240 }],
      cutter: { kind: 'router', kerf_mm: 6, tool_mm: 6, spacing_mm: 10, margin_mm: 20 },
    },
  },
};

/** The pavilion stands on its six lowest nodes. */
function FEET() {
  return Object.fromEntries(['A1', 'A2', 'A3', 'A4', 'A5', 'A6'].map((mark) => [mark, 'foot']));
}

for (const [name, { about, job }] of Object.entries(TEMPLATES)) {
  const given = { format: 'strutwright-job/1', truss: 'truss.json', ...job };
  const whole = jobSchema.parse(given);
  const text = `${about.map((line) => `// ${line}`).join('\n')}\n${write(whole, SCHEMA, '')}\n`;
  writeFileSync(new URL(`${name}/job.json`, import.meta.url), text);
}
writeFileSync(new URL('table-model-us/truss.json', import.meta.url), inInches('table-model/truss.json'));
writeFileSync(new URL('garden-pavilion/truss.json', import.meta.url), pavilion());

/** A value with each key of an object under its explanation; what is left out or empty stands there as comments, key by key. */
function write(value, schema, indent) {
  const deeper = `${indent}  `;
  if (Array.isArray(value)) {
    const pattern = value.length === 0 ? patternOf(schema, deeper) : [];
    if (pattern.length > 0) return `[\n${pattern.join('\n')}\n${indent}]`;
    if (value.every((v) => v === null || typeof v !== 'object')) return `[${value.map((v) => JSON.stringify(v)).join(', ')}]`;
    return `[\n${value.map((v) => deeper + write(v, schema.items ?? {}, deeper)).join(',\n')}\n${indent}]`;
  }
  if (value === null || typeof value !== 'object') return JSON.stringify(value);
  const known = schema.properties ?? {};
  const keys = Object.keys(known).length > 0 ? Object.keys(known) : Object.keys(value);
  const lines = Object.keys(value).length === 0 ? patternOf(schema, deeper) : [];
  const present = keys.filter((key) => value[key] !== undefined);
  for (const key of keys) {
    if (key === '$schema') continue;
    if (known[key]) lines.push(...wrap(explained(known[key]), deeper));
    if (value[key] === undefined) lines.push(`${deeper}// "${key}": absent here`, ...patternOf(known[key], deeper));
    else {
      const inner = known[key] ?? (typeof schema.additionalProperties === 'object' ? schema.additionalProperties : {});
      const comma = key === present.at(-1) ? '' : ',';
      lines.push(`${deeper}${JSON.stringify(key)}: ${write(value[key], inner, deeper)}${comma}`);
    }
  }
  return lines.length === 0 ? '{}' : `{\n${lines.join('\n')}\n${indent}}`;
}

/** What an entry of a list, an entry of a map or an object that is absent here would hold: its keys with their explanations, as comments. */
function patternOf(schema, indent) {
  const lines = [];
  const entry = schema.items ?? (typeof schema.additionalProperties === 'object' ? schema.additionalProperties : null);
  const tell = (of, depth) => {
    for (const [key, inner] of propertiesOf(of)) {
      lines.push(...wrap(`"${key}": ${explained(inner)}`, `${indent}// ${'  '.repeat(depth)}`.replace(/\/\/ $/, '')));
      tell(inner.items ?? inner, depth + 1);
    }
  };
  tell(entry ?? schema, 1);
  if (lines.length === 0) return [];
  const head = schema.items ? 'Each entry:' : entry ? 'Each entry, by its name:' : 'It would hold:';
  return [`${indent}// ${head}`, ...lines];
}

/** The keys of an object, or of all objects that may stand in its place. */
function propertiesOf(schema) {
  const found = new Map(Object.entries(schema.properties ?? {}));
  for (const choice of [...(schema.anyOf ?? []), ...(schema.oneOf ?? [])])
    for (const [key, inner] of propertiesOf(choice)) {
      const before = found.get(key);
      // A key that tells the choices apart has each of their names, and says nothing of the first alone.
      const names = before ? [...new Set([...namesOf(before), ...namesOf(inner)])] : [];
      const description = names.length > 1 ? 'Which of them.' : before?.description;
      found.set(key, before ? { ...before, description, enum: names } : inner);
    }
  return found;
}

function namesOf(schema) {
  return schema.enum ?? (typeof schema.const === 'string' ? [schema.const] : []);
}

/** The explanation of a key, with the words it may have. */
function explained(schema) {
  const names = namesOf(schema).filter((name) => name !== null);
  const words = schema.description ?? '';
  return names.length > 1 ? `${words}${words ? ' ' : ''}One of: ${names.join(', ')}.` : words;
}

/** Comment lines; `indent` may begin the comment itself. */
function wrap(words, indent) {
  const lines = [];
  let line = '';
  for (const word of words.split(' ')) {
    if (indent.length + line.length + word.length > 112) {
      lines.push(line);
      line = '';
    }
    line += line === '' ? word : ` ${word}`;
  }
  const lead = indent.includes('//') ? indent : `${indent}// `;
  return [...lines, line].map((text) => lead + text);
}

/** The same truss in inches, to a millionth; a force face of one squared inch is 645.16 of one squared millimetre. */
function inInches(path) {
  const text = readFileSync(new URL(path, import.meta.url), 'utf8');
  const inches = (v) => Number((Number(v) / 25.4).toFixed(6));
  return text
    .replace(/"units": *"mm"/, '"units": "in"')
    .replace(/"newtonPerArea": *([^,}]*)/, (_, n) => `"newtonPerArea": ${Number(n) * 25.4 ** 2}`)
    .replace(/"at": *\[([^\]]*)\]/g, (_, list) => `"at": [${list.split(',').map(inches).join(', ')}]`);
}

/** Six posts, a ring of eaves, rafters to a crown, a brace in each wall and each roof bay; metres; invented. */
function pavilion() {
  const ring = (row, radius, height) =>
    [0, 1, 2, 3, 4, 5].map((k) => {
      const angle = (Math.PI * k) / 3;
      return [`${row}${k + 1}`, [radius * Math.cos(angle), radius * Math.sin(angle), height].map((v) => Number(v.toFixed(6)) + 0)];
    });
  const nodes = [...ring('A', 1.5, 0), ...ring('B', 1.5, 2.1), ...ring('C', 0.6, 2.7)];
  const next = (k) => (k % 6) + 1;
  const members = [];
  const add = (a, b, group) => members.push({ id: `S${String(members.length + 1).padStart(2, '0')}`, ends: [a, b], group });
  for (let k = 1; k <= 6; k++) add(`A${k}`, `B${k}`, 'posts');
  for (let k = 1; k <= 6; k++) add(`A${k}`, `B${next(k)}`, 'wall braces');
  for (let k = 1; k <= 6; k++) add(`B${k}`, `B${next(k)}`, 'eaves');
  for (let k = 1; k <= 6; k++) add(`B${k}`, `C${k}`, 'rafters');
  for (let k = 1; k <= 6; k++) add(`B${k}`, `C${next(k)}`, 'roof braces');
  for (let k = 1; k <= 6; k++) add(`C${k}`, `C${next(k)}`, 'crown');
  const faces = [];
  for (let k = 1; k <= 6; k++)
    faces.push({ id: `P${k}`, nodes: [`B${k}`, `B${next(k)}`, `C${next(k)}`, `C${k}`], panel: true, group: 'roof' });
  faces.push({ id: 'P7', nodes: ['C1', 'C2', 'C3', 'C4', 'C5', 'C6'], panel: true, group: 'crown' });
  const row = (item) => `    ${JSON.stringify(item).replace(/([:,])(?=["[\d-])/g, '$1 ')}`;
  const list = (name, items) => `  "${name}": [\n${items.map(row).join(',\n')}\n  ]`;
  return `// An invented pavilion of 3 m across: six posts, eaves, a crown, a brace in every bay.\n{\n  "format": "strutwright-truss/1",\n  "units": "m",\n${[
    list(
      'nodes',
      nodes.map(([id, at]) => ({ id, at })),
    ),
    list('members', members),
    list('faces', faces),
    list(
      'supports',
      [1, 2, 3, 4, 5, 6].map((k) => ({ node: `A${k}`, fixed: 'xyz' })),
    ),
  ].join(',\n')}\n}\n`;
}
