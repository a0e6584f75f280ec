/** The survey's invented field camera; its finds lie in the open sea, so that no real place is pointed at. */
export const FIELD_CAMERA = {
  make: 'Calder',
  model: 'Field 24',
  lens: '60 mm f/4 macro 1-2.5x',
  offset: '+00:00',
  focalLengthMm: 60,
  aperture: '63/10',
  exposure: '1/125',
  iso: 400,
  sensorWidthMm: 23.5,
  place: { latitude: 56.5, longitude: 3.2 },
} as const;
