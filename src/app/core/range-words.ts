import { MICROMETRES_PER, NO_BREAK_SPACE, unitFor } from '@shared/units/length';

/** A length with the digits that somebody stated, and no more: "0.5 mm", "500 µm". */
export function statedWords(um: number): string {
  return rangeWords(um, um);
}

/** A printed range as its book has it, in the unit that its upper end is written in: "8–9 µm", "2–3 mm". */
export function rangeWords(minUm: number, maxUm: number): string {
  const unit = unitFor(maxUm);
  const [low, high] = [minUm, maxUm].map((um) => String(Number((um / MICROMETRES_PER[unit]).toPrecision(6))));
  return `${low === high ? low : `${low}–${high}`}${NO_BREAK_SPACE}${unit}`;
}
