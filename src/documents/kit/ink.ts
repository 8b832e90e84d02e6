/** Colours, sizes (pt) and line widths (mm) of every paper. All works in black alone; hue only adds. */
export const INK = {
  black: '#000000',
  /** What the hand must not use. */
  grey: '#6b6b6b',
  /** Hair rules, earlier parts, struts without force. */
  faint: '#b0b0b0',
  white: '#ffffff',
  /** Ends of ColorBrewer's PuOr (Harrower and Brewer 2003), safe for the colour-blind. */
  tension: '#b35806',
  compression: '#542788',
} as const;

export const SIZE = { note: 7, body: 9, head: 12, title: 20, mark: 28 } as const;

export const LINE = { hair: 0.1, thin: 0.2, normal: 0.35, strong: 0.7 } as const;
