/** What a page's stream of drawing operators is to the PDF library. */
export interface ContentStream {
  write(chunk: string | Uint8Array): void;
  end(chunk?: string | Uint8Array): void;
}

/** Characters that are gathered before they become one chunk of bytes. */
const CHUNK = 32_768;

/**
 * Makes a page's stream gather its operators: the library keeps each as an array of bytes of its own until the paper ends, some
 * hundred bytes of housekeeping for twenty of content. The bytes written are the same.
 */
export function gatherContent(content: ContentStream): void {
  const [write, end] = [content.write.bind(content), content.end.bind(content)];
  let waiting: string[] = [];
  let length = 0;
  const flush = (): void => {
    if (waiting.length === 0) return;
    write(bytesOf(waiting, length));
    waiting = [];
    length = 0;
  };
  content.write = (chunk) => {
    if (typeof chunk !== 'string') {
      flush();
      write(chunk);
      return;
    }
    waiting.push(chunk);
    length += chunk.length + 1;
    if (length >= CHUNK) flush();
  };
  content.end = (chunk) => {
    if (chunk) content.write(chunk);
    flush();
    end();
  };
}

/** Lines as one byte a character, each with its line's end, as the library writes them. */
function bytesOf(lines: readonly string[], length: number): Uint8Array {
  const bytes = new Uint8Array(length);
  let at = 0;
  for (const line of lines) {
    for (let k = 0; k < line.length; k++) bytes[at++] = line.charCodeAt(k) & 0xff;
    bytes[at++] = LINE_END;
  }
  return bytes;
}

const LINE_END = 10;
