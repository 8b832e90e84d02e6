/** A group of a DXF file: its code and its value. */
export type Pair = readonly [number, string | number];

/** Groups as the text of a file: a line for each code and each value, CR LF. */
export const pairsToText = (pairs: readonly Pair[]): string =>
  `${pairs.map(([code, value]) => `${code}\r\n${typeof value === 'number' ? formatNumber(code, value) : value}`).join('\r\n')}\r\n`;

/** Whole numbers in the codes that hold integers, else decimals to a millionth. */
function formatNumber(code: number, value: number): string {
  const whole = (code >= 60 && code <= 99) || (code >= 270 && code <= 289) || (code >= 370 && code <= 389);
  if (whole) return String(Math.round(value));
  const text = value.toFixed(6).replace(/0+$/, '');
  return text === '-0.' ? '0.0' : text.endsWith('.') ? `${text}0` : text;
}
