import type { Front } from './front-kernel.js';
import { updateModule } from './update-module.js';

/** What of the WebAssembly interface is used here; every Node and browser of the last years has it. */
declare const WebAssembly:
  | {
      validate(bytes: Uint8Array<ArrayBuffer>): boolean;
      Module: new (bytes: Uint8Array<ArrayBuffer>) => object;
      Memory: new (size: { initial: number }) => { readonly buffer: ArrayBuffer; grow(pages: number): number };
      Instance: new (module: object, imports: object) => { readonly exports: Readonly<Record<string, unknown>> };
    }
  | undefined;

export type FastUpdate = (
  a: number,
  b: number,
  stride: number,
  wide: number,
  rowFrom: number,
  rowTo: number,
  columnFrom: number,
  columnTo: number,
  depthFrom: number,
  depthTo: number,
) => void;

const PAGE = 65536;
/** One memory a thread, grown to the largest front that was asked for: a memory of its own for every factor would wait on the collector. */
let kernel:
  | { readonly memory: { readonly buffer: ArrayBuffer; grow(pages: number): number }; readonly update: FastUpdate }
  | null
  | undefined;

/**
 * Room for fronts of up to `values` numbers with `scaled` numbers beside: in the memory of the compiled update where the
 * engine has it, in plain arrays otherwise. Only the latest workspace of a thread may be used.
 */
export function frontWorkspace(values: number, scaled: number): Front {
  if (kernel === undefined) kernel = compile();
  const bytes = 8 * (values + (values & 1) + scaled);
  if (kernel && grown(kernel.memory, bytes)) {
    const { buffer } = kernel.memory;
    const second = 8 * (values + (values & 1));
    return {
      values: new Float64Array(buffer, 0, values),
      scaled: new Float64Array(buffer, second, scaled),
      fast: kernel.update,
    };
  }
  return { values: new Float64Array(values), scaled: new Float64Array(scaled), fast: null };
}

function compile(): typeof kernel {
  if (typeof WebAssembly === 'undefined') return null;
  const bytes = updateModule();
  if (!WebAssembly.validate(bytes)) return null;
  const memory = new WebAssembly.Memory({ initial: 16 });
  const { exports } = new WebAssembly.Instance(new WebAssembly.Module(bytes), { e: { m: memory } });
  return { memory, update: exports['update'] as FastUpdate };
}

function grown(memory: { readonly buffer: ArrayBuffer; grow(pages: number): number }, bytes: number): boolean {
  const lacking = bytes - memory.buffer.byteLength;
  if (lacking <= 0) return true;
  try {
    memory.grow(Math.ceil(lacking / PAGE));
    return true;
  } catch {
    return false; // more than an engine gives: plain arrays serve
  }
}
