import { describe, expect, it } from 'vitest';
import { defaultJob } from '../../src/model/job/index.js';
import { sayFault } from '../../src/readers/fault.js';
import { readJob } from '../../src/readers/job.js';

const LEAST = '{ "format": "strutwright-job/1", "title": "T", "truss": "t.json" }';
const faultsOf = (text: string): string[] => readJob(text, 'job.json').faults.map(sayFault);
const withKey = (more: string): string[] => faultsOf(LEAST.replace(' }', `,\n${more} }`));

it('format, title and truss are enough', () => {
  expect(readJob(LEAST, 'job.json').faults).toEqual([]);
  expect(readJob(LEAST, 'job.json').job).toEqual({ ...defaultJob('T'), truss: 't.json' });
});

it('takes the keys that scripts rely on', () => {
  expect(
    withKey(`"forces": { "source": "analysis", "sign": -1, "largest_N": 100 }, "analysis": { "joints": "pinned", "selfWeight": true },
    "waivers": [ { "code": "member-over-stressed", "subject": "S12", "upTo": 1.05, "reason": "tested", "by": "me" } ],
    "use": "overhead", "scale": 0.2, "forceScale": 1, "saw": { "step_mm": 0.5, "endFloat_mm": 0.75 }, "date": "2026-12-01", "revision": "A"`),
  ).toEqual([]);
});

describe('each fault has its place and its mending', () => {
  it.each([
    ['"scal": 2', /^job\.json:2:1: the key "scal" is unknown: write "scale"$/],
    ['"saw": { "step": 1 }', /^job\.json:2:10: the key "step" is unknown in saw: (write "step_mm"|use one of step_mm)/],
    ['"scale": 0', /^job\.json:2:10: scale is too small: write more than 0$/],
    ['"scale": 1e999', /not finite/],
    ['"date": "1 Dec 2026"', /date is "1 Dec 2026": write a date as year-month-day/],
    ['"use": "garden"', /use is "garden": write "table" or "display" or "outdoor" or "overhead"$/],
    ['"forces": { "sign": 2 }', /forces\.sign is 2: write 1 or -1$/],
    [
      '"sections": { "my": { "shape": { "kind": "round" }, "material": "oak" } }',
      /sections\.my\.shape\.diameter_mm is missing/,
    ],
    [
      '"sections": { "my": { "shape": { "kind": "hexagon" }, "material": "oak" } }',
      /sections\.my\.shape\.kind is "hexagon": write "round" or "tube" or "rectangle"$/,
    ],
    [
      '"sections": { "my": { "shape": { "kind": "tube", "diameter_mm": 10, "wall_mm": 5 }, "material": "S235" } }',
      /the wall of section "my" is half its diameter of 10 mm or more: write less than 5/,
    ],
    ['"printers": []', /printers is too short: write at least 1 of them/],
    ['"seed": 1.5', /seed/],
    ['"loads": { "cases": [ { "name": "a\\nb", "kind": "snow" } ] }', /is no name for a case/],
    ['"owner": "a\\u0000"', /owner holds a character that does not print/],
  ])('%s', (more, words) => {
    const said = withKey(more);
    expect(said).toHaveLength(1);
    expect(said[0]).toMatch(words);
  });

  it('the required keys, all at once', () => {
    expect(faultsOf('{}')).toEqual([
      expect.stringMatching(/^job\.json:1:1: format is missing: add "format": write "strutwright-job\/1"$/),
      expect.stringMatching(/title is missing/),
      expect.stringMatching(/truss is missing/),
    ]);
  });
});

it('a section, group or case may be called what the language has for itself', () => {
  const { job } = readJob(
    LEAST.replace(
      ' }',
      ', "struts": { "groups": { "toString": "beech-6" } }, "loads": { "combinations": [ { "name": "c", "factors": { "valueOf": 1 } } ] } }',
    ),
    'job.json',
  );
  expect(job!.struts.groups['constructor']).toBeUndefined();
  expect(job!.sections['constructor']).toBeUndefined();
  expect(job!.struts.groups['toString']).toBe('beech-6');
});

it('says that no printer prints by the process of the hubs', () => {
  const text = (process: string): string =>
    `{ "format": "strutwright-job/1", "title": "T", "truss": "t.json",\n  "nodes": { "process": "resin" },\n  "printers": [{ "process": "${process}" }] }`;
  expect(readJob(text('resin'), 'job.json').faults).toEqual([]);
  const { job, faults } = readJob(text('filament'), 'job.json');
  expect(job).toBeNull();
  expect(faults).toHaveLength(1);
  expect(sayFault(faults[0]!)).toMatch(/^job\.json:3:.*no printer prints by resin/);
});
