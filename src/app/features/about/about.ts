import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { ImageTile } from '@shared/contracts/images';
import type { Grounds } from '@shared/scale/scale';
import { PageMeta } from '../../core/page-meta';
import { Rule } from '../../ui/rule/rule';
import { ScaleBar } from '../../ui/scale-bar/scale-bar';

interface BarMeaning {
  readonly name: string;
  readonly meaning: string;
  readonly scale: ImageTile['scale'];
}

/** What this is, how to read a bar, and what to mind. */
@Component({
  selector: 'app-about',
  imports: [RouterLink, Rule, ScaleBar],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './about.html',
  styleUrl: './about.scss',
})
export class About {
  /** a picture this wide at 1 µm/px has a bar of 200 µm, a quarter of it */
  protected readonly sampleWidth = 800;
  protected readonly bars: readonly BarMeaning[] = [
    {
      name: $localize`Calibrated`,
      meaning: $localize`A stage micrometer was photographed with the same optics and the same setting.`,
      scale: scaleOf('calibrated'),
    },
    {
      name: $localize`Referenced`,
      meaning: $localize`A ruler, or an object whose size is known, lies in the picture.`,
      scale: scaleOf('referenced'),
    },
    {
      name: $localize`Estimated`,
      meaning: $localize`A fingertip lies in the picture, or the size was worked out from the optics. It may be off by a fifth or more, so its lengths carry ≈.`,
      scale: scaleOf('estimated'),
    },
    {
      name: $localize`No scale`,
      meaning: $localize`Nobody knows how large it is. Only ratios can be measured.`,
      scale: null,
    },
  ];

  constructor() {
    inject(PageMeta).describe({
      title: $localize`About`,
      description: $localize`What Motebook is, how its scale bars are to be read, and what to mind.`,
      image: null,
    });
  }
}

function scaleOf(grounds: Exclude<Grounds, 'none'>): ImageTile['scale'] {
  return { umPerPxX: 1, umPerPxY: 1, relativeUncertainty: 0.01, grounds };
}
