/** Ticks and the step that survive a reload; where the browser keeps nothing (private windows), they last as long as the page. */
export interface Store {
  isTicked(mark: string): boolean;
  tick(mark: string, on: boolean): void;
  step(): number;
  keepStep(step: number): void;
}

interface Kept {
  readonly ticks: string[];
  readonly step: number;
}

export function openStore(key: string): Store {
  const name = `strutwright ${key}`;
  const kept = read(name);
  const ticks = new Set(kept.ticks);
  let at = kept.step;
  const save = (): void => write(name, { ticks: [...ticks].sort(), step: at });
  return {
    isTicked: (mark) => ticks.has(mark),
    tick(mark, on) {
      if (on) ticks.add(mark);
      else ticks.delete(mark);
      save();
    },
    step: () => at,
    keepStep(step) {
      at = step;
      save();
    },
  };
}

function read(name: string): Kept {
  try {
    const kept = JSON.parse(localStorage.getItem(name) ?? '{}') as Partial<Kept>;
    return {
      ticks: Array.isArray(kept.ticks) ? kept.ticks.filter((t) => typeof t === 'string') : [],
      step: Number.isInteger(kept.step) ? (kept.step as number) : 0,
    };
  } catch {
    return { ticks: [], step: 0 };
  }
}

function write(name: string, kept: Kept): void {
  try {
    localStorage.setItem(name, JSON.stringify(kept));
  } catch {
    // Nothing is kept; the page works without.
  }
}
