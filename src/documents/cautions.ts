/** What every sheet says in its strip: short, whole, never left out. */
export const CAUTION =
  'An aid, not an approval: for anything that people stand on or under, local codes and a licensed engineer decide. A standing model proves nothing about the full size.';

/** What the report says about the work itself, one a trade. */
export const CAUTIONS: readonly { readonly trade: string; readonly words: string }[] = [
  {
    trade: 'Standing',
    words:
      'The result is an aid. For anything that people stand on or under, local codes and a licensed engineer decide. A standing model proves nothing about the full size: weight grows with the cube of the scale, strength with its square.',
  },
  {
    trade: 'Sawing',
    words:
      'Lay round bars in a V-cradle. Clamp every piece, and never hold one shorter than 150 mm by hand. Let the blade stop before you reach in.',
  },
  {
    trade: 'Laser',
    words:
      'Never cut PVC: it gives off chlorine. Acrylic flares: never leave a running laser, and keep an extinguisher at hand. Cut no polycarbonate over 1 mm.',
  },
  { trade: 'Printing', words: 'Printing gives off fumes: air the room. Print the fit gauge before anything else.' },
  {
    trade: 'Building',
    words:
      'Prop whatever is not yet stable, and stand clear of it. Never force a space frame to fit. Fix nothing for good before it is aligned.',
  },
];
