import type { Session } from '../shared/contracts/session.js';

/**
 * The people of the demo, one per role, and how to sign in as them. Invented, like everything about them.
 * They exist only where the demo was filled into an empty data folder.
 */
export const DEMO_PEOPLE: Session['demo'] = [
  { name: 'Imre Waddell', role: 'photographer', email: 'imre@calderwick.example', password: 'under the sleepers' },
  { name: 'Maud Okonjo-Leigh', role: 'identifier', email: 'maud@calderwick.example', password: 'warts not a net' },
  { name: 'Odile Hartnoll', role: 'editor', email: 'odile@calderwick.example', password: 'card bark and stone' },
  { name: 'Tamsin Pell', role: 'keeper', email: 'tamsin@calderwick.example', password: 'put the log back' },
];
