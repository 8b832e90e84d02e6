/** Ways into a value of unknown type that never throw, for checks that run before the types are known to be right. */

/** The list under a key; empty where there is none. */
export function items(value: unknown, key: string): readonly unknown[] {
  const list = (value as Record<string, unknown> | null | undefined)?.[key];
  return Array.isArray(list) ? list : [];
}

/** The text under a key, or null. */
export function textOf(value: unknown, key: string): string | null {
  const text = (value as Record<string, unknown> | null | undefined)?.[key];
  return typeof text === 'string' ? text : null;
}

/** The list under a key with what is not a text as undefined; empty where there is none. */
export const listOfTexts = (value: unknown, key: string): (string | undefined)[] =>
  items(value, key).map((v) => (typeof v === 'string' ? v : undefined));
