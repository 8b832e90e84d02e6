/** Colours of the terminal's own palette; the words beside them say the same. */
const CODE = { bold: '1', grey: '90', orange: '33', purple: '35' } as const;

export type Paint = (style: keyof typeof CODE, text: string) => string;

export const painter =
  (colour: boolean): Paint =>
  (style, text) =>
    colour ? `\u001b[${CODE[style]}m${text}\u001b[0m` : text;
