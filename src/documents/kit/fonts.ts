/** The bytes of the faces that papers embed, handed in by the caller: TrueType files. */
export interface Fonts {
  readonly regular: Uint8Array;
  readonly bold: Uint8Array;
  /** Stand behind the two above for characters that they lack. */
  readonly fallback: Uint8Array;
  readonly fallbackBold: Uint8Array;
}
