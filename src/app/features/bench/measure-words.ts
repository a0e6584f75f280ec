import { measureNote, type BodyMeasure } from '@shared/annotations/measure';
import type { NoteGeometry } from '@shared/annotations/note';
import { structureOf, type Dimension } from '@shared/annotations/structures';
import { DomainError } from '@shared/errors';
import { quantityText } from '@shared/scale/rounding';
import type { Scale } from '@shared/scale/scale';

export function dimensionWords(dimension: Dimension): string {
  return dimension === 'length' ? $localize`along` : $localize`across`;
}

/**
 * A measured body in lines: '8.44 ± 0.27 µm along', '7.9 ± 0.27 µm across', 'Q 1.07'. In pixels while there
 * is no scale. Empty where the shape does not fit the structure.
 */
export function measureWords(geometry: NoteGeometry, structure: string | null, scale: Scale | null): readonly string[] {
  const measure = measured(geometry, structure, scale);
  if (!measure) return [];
  const sizes = measure.dimensions.map(({ dimension, px, um, u }) => {
    const size =
      scale && um !== null && u !== null ? quantityText(um, u, scale.grounds) : $localize`${px.toFixed(1)} px`;
    return measure.dimensions.length > 1 ? `${size} ${dimensionWords(dimension)}` : size;
  });
  return measure.q === null ? sizes : [...sizes, `Q ${measure.q.toFixed(2)}`];
}

function measured(geometry: NoteGeometry, structure: string | null, scale: Scale | null): BodyMeasure | null {
  const way = structure === null ? undefined : structureOf(structure)?.way;
  if (!way) return null;
  try {
    return measureNote(geometry, way, scale);
  } catch (error) {
    // a shape from before its structure's way changed stays drawn and is not measured
    if (error instanceof DomainError) return null;
    throw error;
  }
}
