import type { EndDetail } from './parts.js';

/**
 * How a strut of a step gets into its two hubs.
 * loose: one of its hubs is still loose, so it slides in along its axis.
 * squeezed: its hubs belong to a small closed unit that is still loose and is pushed together evenly.
 * spread: hub and struts are bent aside within the strain limit and spring back into the sockets.
 * detail: its end has a closing detail (drop-in, slide, or a clamped hub).
 * blocked: none of these; it needs a closing detail that the job does not give it.
 */
export type Entry = 'loose' | 'squeezed' | 'spread' | 'detail' | 'blocked';

export interface StrutEntry {
  readonly strut: string;
  readonly entry: Entry;
  /** Bending strain that spreading costs, as a share; null where it is not spread. */
  readonly strain: number | null;
  /** Closing detail and the node that has it; null where it needs none or has none. */
  readonly detail: { readonly node: string; readonly kind: EndDetail | 'clamp' } | null;
  /** Mark of the hub or strut that a blocked one would run into; absent: its travel is what blocks it. */
  readonly hits?: string;
}

export interface AssemblyStep {
  readonly number: number;
  readonly kind: 'unit' | 'hub' | 'panel';
  /** Hubs that are new in this step. */
  readonly hubs: readonly string[];
  readonly struts: readonly StrutEntry[];
  readonly panels: readonly string[];
  /** Nodes propped from this step on, and props that may go after it. */
  readonly props: readonly string[];
  readonly release: readonly string[];
  /** Until the glue of this step holds, minutes; 0: nothing is glued. */
  readonly hold_min: number;
  /** Largest deflection of what stands under its own weight, mm; null where it was not computed. */
  readonly deflection_mm: number | null;
  /** What stands can move without straining, even with its props. */
  readonly unstable: boolean;
  /** Whether a hand (and a driver, where joints are screwed or pinned) reaches every new hub. */
  readonly access: boolean;
  /** Of the parts of this step, kg. */
  readonly mass_kg: number;
}

/** A set of parts put together flat on the bench and lifted in one. */
export interface BenchUnit {
  readonly name: string;
  readonly face: string;
  readonly hubs: readonly string[];
  readonly struts: readonly string[];
  readonly mass_kg: number;
  /** Long and short side over the hubs' outsides. */
  readonly size_mm: readonly [number, number];
  readonly throughDoor: boolean;
  readonly inVan: boolean;
  readonly people: number;
  /** Whether the people of the job are enough to lift it. */
  readonly lifted: boolean;
}

export interface Bag {
  readonly name: string;
  readonly steps: readonly [number, number];
  readonly hubs: readonly string[];
  readonly struts: readonly string[];
  readonly panels: readonly string[];
  readonly mass_kg: number;
}

export interface AssemblyPlan {
  readonly steps: readonly AssemblyStep[];
  readonly units: readonly BenchUnit[];
  /** Struts that need a closing detail, with the one the job gives or null. */
  readonly closing: readonly StrutEntry[];
  readonly bags: readonly Bag[];
  /** Spare struts by section and length, spare hubs by number of sockets. */
  readonly spares: readonly { readonly what: string; readonly count: number }[];
}
