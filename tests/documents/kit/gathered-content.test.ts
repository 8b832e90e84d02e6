import { expect, it } from 'vitest';
import { gatherContent } from '../../../src/documents/kit/gathered-content.js';

/** A stream as the PDF library's: a string is one byte a character and a line's end, bytes go as they are. */
function stream() {
  const chunks: Uint8Array[] = [];
  let ended = 0;
  const content = {
    write: (chunk: string | Uint8Array) =>
      void chunks.push(typeof chunk === 'string' ? Buffer.from(`${chunk}\n`, 'latin1') : chunk),
    end: () => void ended++,
  };
  return { content, chunks, ended: () => ended, bytes: () => Buffer.concat(chunks) };
}

it('writes the bytes that the stream would have written, in order, in few chunks', () => {
  const [plain, gathered] = [stream(), stream()];
  gatherContent(gathered.content);
  for (const { content } of [plain, gathered]) {
    for (let i = 0; i < 20_000; i++) {
      content.write(`${i / 7} ${i} m`);
      if (i % 9000 === 0) content.write(new Uint8Array([1, 2, 255]));
      if (i % 5000 === 0) content.write('(\u00e9\u20ac) Tj');
    }
    content.end();
  }
  expect(gathered.bytes().equals(plain.bytes())).toBe(true);
  expect(gathered.ended()).toBe(1);
  expect(gathered.chunks.length).toBeLessThan(30);
});

it('writes nothing to a stream that nothing was written to', () => {
  const { content, chunks, ended } = stream();
  gatherContent(content);
  content.end();
  expect([chunks.length, ended()]).toEqual([0, 1]);
});
