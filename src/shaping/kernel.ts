import Module, { type Manifold, type ManifoldToplevel } from 'manifold-3d';

export type Kernel = ManifoldToplevel;
export type { Manifold };

let loading: Promise<Kernel> | null = null;

/** The solid kernel, one instance a thread; set up on first use. */
export function loadKernel(): Promise<Kernel> {
  loading ??= Module().then((kernel) => {
    kernel.setup();
    return kernel;
  });
  return loading;
}

/** What the kernel says of a solid that it could not make: it hands back an empty one in silence. */
export class SolidFailed extends Error {}

/**
 * Keeps track of the solids made inside it and frees them together: the kernel's memory is not collected, about 1 MB a boolean.
 */
export class Bench {
  private readonly held = new Set<{ delete(): void }>();

  constructor(readonly kernel: Kernel) {}

  /** Takes a new solid into care; refuses one that the kernel has failed to make. */
  hold(solid: Manifold, what: string): Manifold {
    this.held.add(solid);
    const status = solid.status();
    if (status !== 'NoError') throw new SolidFailed(`${what}: ${status}`);
    return solid;
  }

  free(solid: Manifold): void {
    if (this.held.delete(solid)) solid.delete();
  }

  clear(): void {
    for (const solid of this.held) solid.delete();
    this.held.clear();
  }
}
