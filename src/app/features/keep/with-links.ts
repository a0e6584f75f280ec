export interface Piece {
  readonly text: string;
  readonly link: boolean;
}

/** A mail's text parted at its addresses, so that they can be followed. Only http and https ever become links. */
export function withLinks(text: string): Piece[] {
  return text
    .split(/(https?:\/\/[^\s<>"]*[^\s<>".,;:!?)])/)
    .map((piece, at) => ({ text: piece, link: at % 2 === 1 }))
    .filter(({ text: piece }) => piece !== '');
}
