/** The survey's invented microscope at its highest setting, which the spores and the stage micrometer share. */
export const BENCH = {
  umPerPx: 0.0732,
  width: 1392,
  height: 1040,
  objective: { aperture: 1.25, condenser: { inner: 0, outer: 0.5 }, medium: 1.33 },
  notes: { make: 'Calder', model: 'Depot scope', lens: '60x 1.25 immersion' },
} as const;
