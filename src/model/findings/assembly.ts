import { entry, num } from './entry.js';

/** Findings of the order of building. */
export const ASSEMBLY_FINDINGS = {
  'truss-in-pieces': entry(
    'warn',
    'truss',
    '',
    (f) => `is in ${num(f.value, 0)} pieces that no strut joins; each is ordered by itself`,
  ),
  'start-unknown': entry(
    'warn',
    'node',
    '',
    () => 'is no node to start from; name one of the truss under "assembly", or leave it out',
  ),
  'strut-cannot-enter': entry(
    'warn',
    'strut',
    '',
    (f) =>
      `${
        f.about?.['hits'] === undefined
          ? 'cannot get in between its two hubs once they stand'
          : `runs into ${f.about['hits']} on its way in`
      }; give it a closing detail under "struts" (a slide or drop-in at one end, or drop-in at both), or clamp a hub`,
  ),
  'step-unstable': entry(
    'stop',
    'truss',
    '',
    (f) =>
      `what stands after step ${num(f.value, 0)} can move freely, props and all; glue or pin the sockets, or add supports`,
    { waivable: false },
  ),
  'fit-up-chance': entry(
    'warn',
    'truss',
    '',
    (f) =>
      `every loop closes within its play in ${num(f.value, 3)} of cases, wanted ${num(f.limit, 3)}; ${f.about?.['mend']}`,
  ),
  'hub-out-of-reach': entry(
    'note',
    'node',
    '',
    (f) =>
      `no hand reaches it in step ${f.about?.['step']} past the struts that stand; build it into a unit on the bench`,
  ),
  'node-needs-prop': entry(
    'note',
    'node',
    '',
    (f) => `needs a prop from step ${f.about?.['step']} until more struts hold it`,
  ),
} as const;
