import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatButtonToggleModule } from '@angular/material/button-toggle';
import { MatCheckboxModule } from '@angular/material/checkbox';
import { Router, RouterLink } from '@angular/router';
import { imageRoutes } from '@shared/contracts/images';
import { rigRoutes, type CalibrationKept as Kept, type Mark } from '@shared/contracts/rigs';
import { UNCERTIFICATED_TOLERANCE_UM } from '@shared/scale/calibration';
import { Api } from '../../../core/api';
import { toApiProblem, type ApiProblem } from '../../../core/api-problem';
import { ProblemBox } from '../../../ui/problem/problem';
import { MarkPicture } from '../../../ui/viewer/mark-picture';
import { look } from './calibration-look';
import { CalibrationKept } from './calibration-kept';
import { FitPanel } from './fit-panel';
import { MicrometerFields, spacingWords, type Micrometer } from './micrometer-fields';
import { MicrometerPicture } from './micrometer-picture';

/** Drop, look, keep: the scale of a setting, from a photograph of a stage micrometer. */
@Component({
  selector: 'app-calibrate',
  imports: [
    RouterLink,
    MatButtonModule,
    MatButtonToggleModule,
    MatCheckboxModule,
    CalibrationKept,
    FitPanel,
    MarkPicture,
    MicrometerFields,
    MicrometerPicture,
    ProblemBox,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './calibrate.html',
  styleUrl: './calibrate.scss',
  host: { class: 'page' },
})
export class Calibrate {
  private readonly api = inject(Api);
  private readonly router = inject(Router);

  readonly rigId = input.required<string>();
  readonly settingId = input.required<string>();
  /** the micrometer's picture: `?image=` */
  readonly image = input<string>();

  protected readonly steps = [
    { name: 'drop', words: $localize`drop the picture` },
    { name: 'look', words: $localize`look and mark` },
    { name: 'keep', words: $localize`keep the scale` },
  ];
  protected readonly rig = this.api.resource(rigRoutes.read, () => ({ params: { rigId: this.rigId() } }));
  protected readonly setting = computed(() =>
    this.rig.error() ? undefined : this.rig.value()?.settings.find(({ id }) => id === this.settingId()),
  );
  protected readonly picture = this.api.resource(imageRoutes.read, () => {
    const imageId = this.image();
    return imageId ? { params: { imageId } } : undefined;
  });

  protected readonly marks = signal<readonly Mark[]>([]);
  protected readonly crossMarks = signal<readonly Mark[]>([]);
  protected readonly across = signal(false);
  protected readonly ruling = signal<'along' | 'across'>('along');
  protected readonly micrometer = signal<Micrometer>({ spacingUm: 10, toleranceUm: UNCERTIFICATED_TOLERANCE_UM });
  protected readonly busy = signal(false);
  protected readonly problem = signal<ApiProblem | null>(null);
  protected readonly kept = signal<Kept | null>(null);

  protected readonly at = computed(() => (this.kept() ? 2 : this.image() ? 1 : 0));
  protected readonly spacingLabel = computed(() => spacingWords(this.micrometer().spacingUm));
  protected readonly indices = computed(() => this.marks().map(({ index }) => index));
  protected readonly look = computed(() =>
    look({
      marks: this.marks(),
      crossMarks: this.across() ? this.crossMarks() : [],
      ...this.micrometer(),
      width: (this.picture.error() ? undefined : this.picture.value()?.width) ?? 1,
      height: (this.picture.error() ? undefined : this.picture.value()?.height) ?? 1,
    }),
  );

  protected take(imageId: string): void {
    this.startOver();
    void this.router.navigate([], { queryParams: { image: imageId } });
  }

  protected otherPicture(): void {
    this.startOver();
    void this.router.navigate([], { queryParams: {} });
  }

  protected setAcross(across: boolean): void {
    this.across.set(across);
    this.ruling.set(across ? 'across' : 'along');
  }

  protected keep(): void {
    const imageId = this.image();
    if (!imageId) return;
    const cross = this.across() && this.crossMarks().length >= 2 ? { crossMarks: [...this.crossMarks()] } : {};
    const body = { imageId, marks: [...this.marks()], ...cross, ...this.micrometer() };
    const params = { rigId: this.rigId(), settingId: this.settingId() };
    if (this.busy()) return;
    this.busy.set(true);
    this.problem.set(null);
    this.api.call(rigRoutes.calibrate, { params, body }).subscribe({
      next: (kept) => this.kept.set(kept),
      error: (error: unknown) => {
        this.busy.set(false);
        this.problem.set(toApiProblem(error));
      },
    });
  }

  private startOver(): void {
    this.marks.set([]);
    this.crossMarks.set([]);
    this.ruling.set('along');
    this.problem.set(null);
  }
}
