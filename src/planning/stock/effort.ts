/**
 * Meter of the work done, in units of about a microsecond on a desk computer of 2020.
 *
 * Counting work instead of time makes a search end at the same point on every machine. `expired` is the caller's own
 * net (a clock), read only when it is given; once it has fired `stopped` stays true.
 */
export class Effort {
  private spent = 0;
  private cut = false;

  constructor(
    private limit: number,
    private readonly expired: (() => boolean) | undefined = undefined,
  ) {}

  spend(units: number): void {
    this.spent += units;
  }

  /** Allows `units` more than were spent so far. */
  extend(units: number): void {
    this.limit = this.spent + units;
  }

  get used(): number {
    return this.spent;
  }

  /** True when the caller's net, not the work, ended the search. */
  get stopped(): boolean {
    if (!this.cut && this.expired?.()) this.cut = true;
    return this.cut;
  }

  get exhausted(): boolean {
    return this.spent >= this.limit || this.stopped;
  }

  /** A share of what is left, metered apart and charged here too. */
  share(units: number): Share {
    return new Share(this, Math.min(this.limit, this.spent + units));
  }
}

/** Part of an effort: exhausted at its own mark or with the whole. */
export class Share {
  constructor(
    private readonly whole: Effort,
    private readonly mark: number,
  ) {}

  spend(units: number): void {
    this.whole.spend(units);
  }

  get exhausted(): boolean {
    return this.whole.used >= this.mark || this.whole.exhausted;
  }
}

export type Meter = Pick<Effort, 'spend' | 'exhausted'>;
