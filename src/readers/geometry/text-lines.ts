import { isUsable, LIMITS } from '../../model/limits.js';
import type { Fault } from '../fault.js';

/** Collects the faults of a file that is read line by line; `line` counts from 1. */
export class LineFaults {
  readonly faults: Fault[] = [];

  constructor(readonly file: string) {}

  tell(line: number, what: string, mend: string, column = 1): void {
    // A file of another kind is wrong in every line; the first hundred say so as well as all.
    if (this.faults.length < 100) this.faults.push({ file: this.file, line, column, what, mend });
  }

  /** Whether the file is too large; tells so. */
  tooLarge(text: string): boolean {
    if (text.length <= LIMITS.fileCharacters) return false;
    this.tell(1, `is larger than ${LIMITS.fileCharacters} characters`, 'split the file');
    return true;
  }
}

/** A decimal number as drawing files write it, or NaN: no hexadecimal, no words, nothing that is not finite or too large. */
export function plainNumber(text: string): number {
  return /^\s*[-+]?(\d+\.?\d*|\.\d+)([eEdD][-+]?\d+)?\s*$/.test(text)
    ? usable(Number(text.replace(/[dD]/, 'e')))
    : Number.NaN;
}

const usable = (value: number): number => (isUsable(value) ? value : Number.NaN);

/** A layer's or group's name as a group of struts: white space joined, what does not print removed; null where nothing is left. */
export function groupName(text: string): string | null {
  const name = text
    .replace(/\s+/gu, ' ')
    .replace(/[\p{Cc}\p{Cf}\p{Cs}]/gu, '')
    .trim();
  return name === '' ? null : name.slice(0, 80);
}
