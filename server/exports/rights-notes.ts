import { type Licence, licenceUri } from '../../shared/contracts/common.js';

/** Whose a picture is and how it may be used, as the file itself carries it. No place, no camera. */
export interface RightsNotes {
  readonly exif: { readonly Artist: string; readonly Copyright: string };
  readonly xmp: string;
}

/** @see XMP Specification Part 1 and 2 (`dc`, `xmpRights`); Creative Commons, XMP recommendation (`cc:license`); from memory */
export function rightsNotes(creditLine: string, licence: Licence): RightsNotes {
  const uri = licenceUri(licence);
  const words = uri === null ? `© ${creditLine}. All rights reserved.` : `© ${creditLine}. ${uri}`;
  const statement =
    uri === null ? '' : `<xmpRights:WebStatement>${uri}</xmpRights:WebStatement><cc:license rdf:resource="${uri}"/>`;
  return {
    // Exif text is ASCII by its standard; what is not is told by the XMP beside it
    exif: { Artist: ascii(creditLine), Copyright: ascii(words) },
    xmp:
      `<x:xmpmeta xmlns:x="adobe:ns:meta/"><rdf:RDF xmlns:rdf="http://www.w3.org/1999/02/22-rdf-syntax-ns#">` +
      `<rdf:Description rdf:about="" xmlns:dc="http://purl.org/dc/elements/1.1/" xmlns:xmpRights="http://ns.adobe.com/xap/1.0/rights/" xmlns:cc="http://creativecommons.org/ns#">` +
      `<dc:creator><rdf:Seq><rdf:li>${escape(creditLine)}</rdf:li></rdf:Seq></dc:creator>` +
      `<dc:rights><rdf:Alt><rdf:li xml:lang="x-default">${escape(words)}</rdf:li></rdf:Alt></dc:rights>` +
      `<xmpRights:Marked>True</xmpRights:Marked>${statement}` +
      `</rdf:Description></rdf:RDF></x:xmpmeta>`,
  };
}

function ascii(text: string): string {
  return text
    .replace('©', '(c)')
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .replace(/[^\x20-\x7e]/g, '?');
}

function escape(text: string): string {
  return text.replace(/[&<>"]/g, (character) => `&#${character.charCodeAt(0)};`);
}
