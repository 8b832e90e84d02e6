/** A place for bytes that are needed once more, later: what is put away is given back by the function that comes of it. */
export interface Spool {
  put(bytes: Uint8Array): Promise<() => Promise<Uint8Array>>;
}

/** Keeps everything in memory. */
export const MEMORY_SPOOL: Spool = {
  put: async (bytes) => async () => bytes,
};
