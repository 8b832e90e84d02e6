import { nearest } from '../maths/nearest.js';
import { markKey, markProblem } from '../model/marks.js';
import { quoted } from './fault.js';
import type { JsonDocument, Path } from './json-document.js';
import { items, textOf } from './loose.js';

type Tell = (path: Path, what: string, mend: string) => void;

/** The nearest mark is looked for this often: in a file where no name fits, it would take longer than all the rest. */
const SUGGESTIONS = 50;

/** The marks of one list of a truss file: checked when made, asked afterwards whether a name leads anywhere. */
export class MarkList {
  readonly #marks = new Set<string>();
  readonly #byKey = new Map<string, string>();
  readonly #names: (string | null)[];
  #suggested = 0;

  /** `always`: marks that exist without standing in the list. */
  constructor(
    document: JsonDocument,
    key: string,
    readonly kind: string,
    readonly tell: Tell,
    always: readonly string[] = [],
  ) {
    for (const mark of always) this.#marks.add(mark);
    this.#names = items(document.value, key).map((item) => textOf(item, 'id'));
    this.#names.forEach((mark, i) => {
      if (mark === null) return;
      const path: Path = [key, i, 'id'];
      const problem = markProblem(mark);
      if (problem) tell(path, `${quoted(mark)} ${problem.what}`, problem.mend);
      const other = this.#byKey.get(markKey(mark));
      if (other !== undefined)
        tell(
          path,
          `the mark ${quoted(mark)} stands on two ${kind}s${other === mark ? '' : `, once as ${quoted(other)}`}`,
          'give each its own, whatever the case',
        );
      else this.#byKey.set(markKey(mark), mark);
      this.#marks.add(mark);
    });
  }

  /** What a sentence calls item i. */
  name(i: number): string {
    const mark = this.#names[i];
    return mark ? `${this.kind} ${quoted(mark)}` : `the ${this.kind} at position ${i}`;
  }

  /** Whether the list has `mark`; tells the fault where not. What is not a text has been told by the schema. */
  mustHold(mark: string | null | undefined, path: Path, who: string): boolean {
    if (typeof mark !== 'string') return false;
    if (this.#marks.has(mark)) return true;
    const near =
      this.#byKey.get(markKey(mark)) ?? (this.#suggested++ < SUGGESTIONS ? nearest(mark, this.#marks) : null);
    this.tell(
      path,
      `${who} names ${this.kind} ${quoted(mark)}, which the file does not have`,
      near ? `write ${quoted(near)}, or add the ${this.kind}` : `add the ${this.kind}`,
    );
    return false;
  }
}
