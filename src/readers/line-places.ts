/** Line and column, from 1, of an offset in a text; lines end with LF, CR or CR LF. */
export function linePlaces(text: string): (offset: number) => { readonly line: number; readonly column: number } {
  let starts: number[] | null = null;
  return (offset) => {
    starts ??= lineStarts(text);
    let [low, high] = [0, starts.length];
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if (starts[middle]! <= offset) low = middle;
      else high = middle;
    }
    return { line: low + 1, column: offset - starts[low]! + 1 };
  };
}

function lineStarts(text: string): number[] {
  const starts = [0];
  for (let i = 0; i < text.length; i++) {
    const c = text.charCodeAt(i);
    if (c === 10 || (c === 13 && text.charCodeAt(i + 1) !== 10)) starts.push(i + 1);
  }
  return starts;
}
