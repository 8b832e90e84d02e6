/**
 * A record as UTF-8 JSON, two spaces a step, full double precision, keys in the order in which the record was made.
 * Typed arrays become arrays; arrays of numbers stay on one line. A number that is not finite is a fault of the program.
 */
export function writeJson(record: unknown): Uint8Array {
  return new TextEncoder().encode(`${format(record, '')}\n`);
}

function format(value: unknown, indent: string): string {
  if (ArrayBuffer.isView(value)) return format(Array.from(value as Float64Array), indent);
  if (typeof value === 'number') {
    if (!Number.isFinite(value)) throw new RangeError('a number to be written is not finite');
    return JSON.stringify(value);
  }
  if (value === null || typeof value !== 'object') return JSON.stringify(value) ?? 'null';
  const deeper = `${indent}  `;
  if (Array.isArray(value)) {
    if (value.length === 0) return '[]';
    const items = value.map((item) => format(item, deeper));
    const flat = `[${items.join(', ')}]`;
    return value.every(isFlat) && flat.length <= 160
      ? flat
      : `[\n${items.map((item) => deeper + item).join(',\n')}\n${indent}]`;
  }
  const entries = Object.entries(value).filter(([, v]) => v !== undefined);
  if (entries.length === 0) return '{}';
  return `{\n${entries.map(([key, v]) => `${deeper}${JSON.stringify(key)}: ${format(v, deeper)}`).join(',\n')}\n${indent}}`;
}

/** A number, or a short list of them: what reads best on one line. */
const isFlat = (value: unknown): boolean =>
  value === null || typeof value === 'number' || (Array.isArray(value) && value.every((v) => typeof v === 'number'));
