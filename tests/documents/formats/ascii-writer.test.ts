import { expect, it } from 'vitest';
import { AsciiWriter } from '../../../src/documents/formats/ascii-writer.js';
import { seededRandom } from '../../../src/maths/random.js';

it('writes numbers as String does, rounded to six places', () => {
  const random = seededRandom(4);
  const values = [
    0, -0, 1, -1, 10, 0.1, -0.000001, 0.0000004, -0.0000004, 0.999999, 0.9999996, 12.5, 100.05, 123456789.25,
  ];
  for (let i = 0; i < 20_000; i++) values.push(Math.fround((random() - 0.5) * 10 ** Math.floor(8 * random() - 3)));
  for (const v of values) {
    const said = new TextDecoder().decode(new AsciiWriter().decimal(v).done());
    const wanted = Math.sign(v) * (Math.round(Math.abs(v) * 1e6) / 1e6) + 0;
    expect(Number(said)).toBe(wanted);
    // Never an exponent, a minus nought or a zero behind the last place.
    expect(said).toMatch(/^(-(?!0$))?(0|[1-9]\d*)(\.\d*[1-9])?$/);
  }
  const many = new AsciiWriter();
  for (let i = 0; i < 50_000; i++) many.whole(i).text(',');
  expect(new TextDecoder().decode(many.done())).toBe(Array.from({ length: 50_000 }, (_, i) => `${i},`).join(''));
});
