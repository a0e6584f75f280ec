import type { NewFind, PlaceInput } from '../shared/contracts/finds.js';

/** Places of an invented town, in the middle of the North Sea, so that no real one is pointed at. */
const PLACES = {
  depot: place(
    'Tram depot, inspection pit 3, under the fourth sleeper',
    'The old tram depot, Calder Wick',
    56.31742,
    2.90418,
  ),
  towpath: place('Towpath, 40 paces past the blue bridge, ash log', 'Canal towpath, Calder Wick', 56.31381, 2.91107),
  allotment: place('Allotment 17, behind the water butt', 'The allotments, Calder Wick', 56.32013, 2.89756),
  wall: place(
    'Lock-keeper’s garden wall, third gap from the gate',
    'A canal-side garden, Calder Wick',
    56.31266,
    2.91582,
  ),
} as const;

function place(exact: string, publicWords: string, latitude: number, longitude: number): PlaceInput {
  return { exact: { words: exact, latitude, longitude, uncertaintyM: 8 }, publicWords, sensitivity: 'medium' };
}

/** Most of a find, public, with one look in the field. */
export function at(where: keyof typeof PLACES, observedOn: string, substrate: string): Omit<NewFind, 'imageIds'> {
  return {
    observation: { kind: 'in the field', observedOn, substrate, remarks: '' },
    place: PLACES[where],
    visibility: 'public',
    heldUntil: null,
  };
}
