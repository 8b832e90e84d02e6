/** What a panel is held to, whatever asks: its verdict under loads and the capacity of what holds it. */
export const PANEL_LIMITS = {
  /** A panel stays in its channel or under its clips while it bows by no more than this share of their bite. */
  shareOfBite: 0.5,
  /** Poisson's ratio where the material gives none. */
  poisson: 0.3,
  /** Arcs round hubs do not matter to the bending of a sheet: corners nearer to a side than this share of the panel's size are left out. */
  coarse: 0.005,
} as const;
