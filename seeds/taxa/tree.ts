import type { TaxonName } from '../../shared/contracts/taxa.js';

type Code = TaxonName['code'];
type Rank = TaxonName['rank'];

/** One name of the demo's tree above genus, with the names from the top down to it. */
export interface TreeName {
  readonly name: string;
  readonly rank: Rank;
  readonly code: Code;
  /** null at the top */
  readonly parent: string | null;
}

const RANKS_DOWN: readonly Rank[] = ['kingdom', 'phylum', 'class', 'order', 'family'];

/**
 * Where the families of the demo stand. Slime moulds in the orders of Martin & Alexopoulos 1969, The
 * Myxomycetes, which the older descriptions are easiest to read by, and not in those of molecular trees since;
 * the others as handbooks have them. All from memory.
 */
const FAMILIES: readonly (readonly [Code, ...string[]])[] = [
  ['botanical', 'Protozoa', 'Mycetozoa', 'Ceratiomyxomycetes', 'Ceratiomyxales', 'Ceratiomyxaceae'],
  ...['Liceaceae', 'Reticulariaceae', 'Cribrariaceae', 'Dictydiaethaliaceae'].map(slimeMould('Liceales')),
  ...['Trichiaceae', 'Arcyriaceae'].map(slimeMould('Trichiales')),
  ...['Physaraceae', 'Didymiaceae'].map(slimeMould('Physarales')),
  ...['Stemonitidaceae'].map(slimeMould('Stemonitidales')),
  ...['Mycenaceae', 'Crepidotaceae', 'Hymenogastraceae', 'Marasmiaceae', 'Psathyrellaceae'].map(
    (family) => ['botanical', 'Fungi', 'Basidiomycota', 'Agaricomycetes', 'Agaricales', family] as const,
  ),
  ['botanical', 'Fungi', 'Basidiomycota', 'Agaricomycetes', 'Auriculariales', 'Auriculariaceae'],
  ['botanical', 'Fungi', 'Basidiomycota', 'Tremellomycetes', 'Tremellales', 'Tremellaceae'],
  ['botanical', 'Fungi', 'Basidiomycota', 'Dacrymycetes', 'Dacrymycetales', 'Dacrymycetaceae'],
  ['botanical', 'Fungi', 'Ascomycota', 'Pezizomycetes', 'Pezizales', 'Pezizaceae'],
  ['zoological', 'Animalia', 'Arthropoda', 'Diplopoda', 'Polydesmida', 'Polydesmidae'],
  ['zoological', 'Animalia', 'Arthropoda', 'Diplopoda', 'Julida', 'Julidae'],
  ['zoological', 'Animalia', 'Arthropoda', 'Arachnida', 'Trombidiformes', 'Trombidiidae'],
  ['zoological', 'Animalia', 'Mollusca', 'Gastropoda', 'Stylommatophora', 'Discidae'],
];

function slimeMould(order: string): (family: string) => readonly [Code, ...string[]] {
  return (family) => ['botanical', 'Protozoa', 'Mycetozoa', 'Myxomycetes', order, family];
}

/** Every name above genus once, parents before what stands below them. */
export function treeNames(): TreeName[] {
  const names = new Map<string, TreeName>();
  for (const [code, ...path] of FAMILIES) {
    path.forEach((name, depth) => {
      if (!names.has(name))
        names.set(name, { name, rank: RANKS_DOWN[depth] as Rank, code, parent: path[depth - 1] ?? null });
    });
  }
  return [...names.values()];
}
