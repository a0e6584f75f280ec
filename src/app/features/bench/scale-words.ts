import type { ScaleProvenance, ScaleView } from '@shared/contracts/scales';
import { distance } from '@shared/geometry/points';
import { quantityParts, roundToUncertainty } from '@shared/scale/rounding';
import { knownObject } from '@shared/scale/reference';
import type { Scale } from '@shared/scale/scale';
import { expanded, POINTING_PX, rectangular } from '@shared/scale/uncertainty';
import { formatLength } from '@shared/units/length';
import { dayWords } from '../../core/day-words';
import { statedWords } from '../../core/range-words';

/** '0.0732 µm' of '0.0732 µm per pixel ± 0.9 %', and what goes with it. */
export interface ScaleLine {
  readonly value: string;
  /** '± 0.9 %', or '(9–15 µm)' for an estimate */
  readonly doubt: string;
  /** 'x 0.0732, y 0.0741': only where pixels are plainly not square */
  readonly axes: string | null;
}

export function scaleLine(scale: Scale): ScaleLine {
  const { umPerPxX, umPerPxY, relativeUncertainty, grounds } = scale;
  const mean = (umPerPxX + umPerPxY) / 2;
  if (grounds === 'estimated') {
    const parts = quantityParts(mean, mean * relativeUncertainty, grounds);
    return { value: `≈ ${parts.value} ${parts.unit}`, doubt: `(${parts.low}–${parts.high} ${parts.unit})`, axes: null };
  }
  const digits = (um: number) =>
    relativeUncertainty > 0 ? roundToUncertainty(um, expanded(um * relativeUncertainty)).value : um.toPrecision(4);
  const square = digits(umPerPxX) === digits(umPerPxY);
  return {
    value: `${digits(mean)} µm`,
    doubt: `± ${percent(expanded(relativeUncertainty))}`,
    axes: square ? null : $localize`${digits(umPerPxX)}:x: along x, ${digits(umPerPxY)}:y: along y`,
  };
}

export function percent(fraction: number): string {
  const value = fraction * 100;
  return `${value >= 10 ? value.toFixed(0) : Number(value.toPrecision(2))} %`;
}

/** How the scale is known, on one line. */
export function groundsLine({ provenance, setAt }: Pick<ScaleView, 'provenance' | 'setAt'>): string {
  switch (provenance.by) {
    case 'calibration':
      return $localize`calibrated, ${provenance.rigName}:rig: ${provenance.settingName}:setting:, ${dayWords(provenance.calibratedAt)}:day:`;
    case 'reference':
      return $localize`from ${referenceWords(provenance)} in the picture, ${dayWords(setAt)}:day:`;
    case 'finger':
      return provenance.own
        ? $localize`estimated from the photographer's own finger`
        : $localize`estimated from a finger`;
    case 'optics':
      return $localize`estimated from the optics' nominal figures`;
    case 'nothing':
      return $localize`said to be unknown, ${dayWords(setAt)}:day:`;
  }
}

function referenceWords({ objectId, lengthUm }: ScaleProvenance & { by: 'reference' }): string {
  const object = objectId === null ? null : knownObject(objectId);
  const length = statedWords(lengthUm);
  return object ? `${object.label} (${length})` : $localize`a stated length of ${length}`;
}

export interface Contribution {
  readonly words: string;
  /** relative standard uncertainty, k = 1 */
  readonly relative: number;
}

/** What the scale's uncertainty consists of, largest first. */
export function contributions(provenance: ScaleProvenance, relativeUncertainty: number): readonly Contribution[] {
  return parts(provenance, relativeUncertainty)
    .filter(({ relative }) => relative > 0)
    .sort((a, b) => b.relative - a.relative);
}

function parts(provenance: ScaleProvenance, total: number): Contribution[] {
  const pointing = (line: { a: { x: number; y: number }; b: { x: number; y: number } }) => ({
    words: $localize`where its two ends were put`,
    relative: (Math.SQRT2 * POINTING_PX) / distance(line.a, line.b),
  });
  switch (provenance.by) {
    case 'calibration':
      return [
        { words: $localize`fit of the marked graduations`, relative: provenance.fitRelative },
        { words: $localize`the micrometer's own tolerance`, relative: provenance.referenceRelative },
      ];
    case 'reference':
      return [
        {
          words: $localize`the reference's own tolerance`,
          relative: rectangular(provenance.toleranceUm / provenance.lengthUm),
        },
        pointing(provenance),
      ];
    case 'finger': {
      const ends = pointing(provenance);
      const rest = Math.sqrt(Math.max(0, total ** 2 - ends.relative ** 2));
      return [
        { words: $localize`how broad a finger is, its soft edge, its distance from the lens`, relative: rest },
        ends,
      ];
    }
    case 'optics':
      return [{ words: $localize`nominal powers and pitch, which are not measured`, relative: total }];
    case 'nothing':
      return [];
  }
}

export interface EvidenceRow {
  readonly term: string;
  readonly said: string;
}

/** Where a scale comes from, fact by fact. */
export function evidence(view: ScaleView): readonly EvidenceRow[] {
  const { provenance, setBy, setAt } = view;
  const set = { term: $localize`Set by`, said: `${setBy.name}, ${dayWords(setAt)}` };
  switch (provenance.by) {
    case 'calibration':
      return [
        { term: $localize`Rig and setting`, said: `${provenance.rigName}, ${provenance.settingName}` },
        { term: $localize`Calibrated`, said: dayWords(provenance.calibratedAt) },
        {
          term: $localize`Graduations marked`,
          said: $localize`${provenance.graduations}:count: over ${formatLength(provenance.spanUm, 0)}:span:`,
        },
        {
          term: $localize`Micrometer's tolerance`,
          said: $localize`± ${Number(provenance.toleranceUm.toPrecision(3))}:tolerance: µm between any two marks`,
        },
        ...(provenance.residualSdPx === null
          ? []
          : [
              {
                term: $localize`Marks scatter about the line by`,
                said: $localize`${provenance.residualSdPx.toFixed(2)} px (SD)`,
              },
            ]),
        ...(provenance.reducedBy === 1
          ? []
          : [
              {
                term: $localize`Reduced from the calibrated frame`,
                said: $localize`to 1/${Number(provenance.reducedBy.toPrecision(3))}:factor:`,
              },
            ]),
        set,
      ];
    case 'reference':
      return [
        { term: $localize`Reference`, said: referenceWords(provenance) },
        { term: $localize`Its tolerance`, said: `± ${statedWords(provenance.toleranceUm)}` },
        { term: $localize`Marked over`, said: $localize`${distance(provenance.a, provenance.b).toFixed(0)} px` },
        set,
      ];
    case 'finger':
      return [
        {
          term: $localize`Finger's breadth at the last joint`,
          said: `${provenance.breadthMm.toFixed(1)} mm, ${provenance.own ? $localize`measured` : $localize`not measured: a cautious mean of people`}`,
        },
        { term: $localize`Marked over`, said: $localize`${distance(provenance.a, provenance.b).toFixed(0)} px` },
        set,
      ];
    case 'optics':
      return [
        {
          term: $localize`Sensor pitch`,
          said: `${provenance.pixelPitchUm} µm${provenance.binning === 1 ? '' : ` × ${provenance.binning}`}`,
        },
        {
          term: $localize`Magnification`,
          said: `${provenance.magnification} ×${provenance.relay === 1 ? '' : ` · ${provenance.relay} ×`}`,
        },
        set,
      ];
    case 'nothing':
      return [set];
  }
}
