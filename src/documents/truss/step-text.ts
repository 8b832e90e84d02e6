/** A text as a STEP string (ISO 10303-21, 6.4.3): ' and \ doubled, what is not printable ASCII as \X2\....\X0\. */
export function stepText(text: string): string {
  let out = '';
  let wide = '';
  const flush = (): void => {
    if (wide !== '') out += `\\X2\\${wide}\\X0\\`;
    wide = '';
  };
  for (let i = 0; i < text.length; i++) {
    const code = text.charCodeAt(i);
    if (code < 0x20 || code > 0x7e) wide += code.toString(16).toUpperCase().padStart(4, '0');
    else {
      flush();
      out += text[i] === "'" ? "''" : text[i] === '\\' ? '\\\\' : text[i];
    }
  }
  flush();
  return `'${out}'`;
}

/** A number as a STEP real: with a decimal point, an E exponent. */
export function stepReal(value: number): string {
  const text = String(Math.round(value * 1e9) / 1e9 + 0).toUpperCase();
  if (text.includes('E')) return text.includes('.') ? text : text.replace('E', '.E');
  return text.includes('.') ? text : `${text}.`;
}
