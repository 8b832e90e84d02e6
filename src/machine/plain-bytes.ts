import { deserialize, serialize } from 'node:v8';

/** A record of plain values and typed arrays as bytes, and back: the structured clone's own form. */
export const toBytes = (value: unknown): Uint8Array => new Uint8Array(serialize(value));

/** The record of such bytes; null where they are none. */
export function fromBytes(bytes: Uint8Array): unknown {
  try {
    return deserialize(bytes);
  } catch {
    return null;
  }
}
