import { ChangeDetectionStrategy, Component, computed, effect, inject, output, signal } from '@angular/core';
import { FormsModule } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatRadioModule } from '@angular/material/radio';
import { MatSelectModule } from '@angular/material/select';
import type { SetScale as SetScaleBody } from '@shared/contracts/scales';
import { fingerScale, UNKNOWN_FINGER } from '@shared/scale/finger';
import { opticsScale } from '@shared/scale/optics';
import { KNOWN_OBJECTS, knownObject, referenceScale } from '@shared/scale/reference';
import type { Scale } from '@shared/scale/scale';
import { DomainError } from '@shared/errors';
import { MICROMETRES_PER } from '@shared/units/length';
import { ApiProblem } from '../../core/api-problem';
import { focusOnceShown } from '../../core/focus-once-shown';
import { problemWords } from '../../core/problem-words';
import { SessionStore } from '../../core/session-store';
import { Submission } from '../../core/submission';
import { BenchStore } from './bench-store';
import { scaleLine } from './scale-words';
import { SettingChoice } from './setting-choice';
import { ToolDesk } from './tool-desk';

type Way = SetScaleBody['by'];
/** How far one's own finger was measured, mm: what a ruler gives; the server takes the same. */
const MEASURED_TO_MM = 0.5;
/** what a field takes that wants more than zero; smaller than any real pitch, power or reference, in any unit */
const LEAST = 0.0001;

/**
 * Sets the picture's scale, by whatever is known: a setting, something of known size in the picture, a
 * finger, the optics' figures, or nothing. What would come of it stands there before it is kept.
 */
@Component({
  selector: 'app-set-scale',
  imports: [
    FormsModule,
    MatButtonModule,
    MatFormFieldModule,
    MatInputModule,
    MatRadioModule,
    MatSelectModule,
    SettingChoice,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './set-scale.html',
  styleUrl: './set-scale.scss',
})
export class SetScale {
  private readonly bench = inject(BenchStore);
  private readonly desk = inject(ToolDesk);
  private readonly me = inject(SessionStore).user;

  readonly done = output<void>();

  protected readonly submission = new Submission();
  protected readonly ways: readonly { readonly by: Way; readonly words: string }[] = [
    { by: 'setting', words: $localize`a setting of my rigs` },
    { by: 'reference', words: $localize`something of known size in the picture` },
    { by: 'finger', words: $localize`a finger in the picture` },
    { by: 'optics', words: $localize`the optics' figures` },
    { by: 'nothing', words: $localize`nothing: it is not known` },
  ];
  protected readonly least = LEAST;
  protected readonly objects = KNOWN_OBJECTS;
  protected readonly units = ['µm', 'mm', 'cm'] as const;

  protected readonly by = signal<Way>('setting');
  protected readonly settingNow = this.bench.image()?.settingId ?? null;
  /** the one that was touched: sent at once, and again with the answer to what was done to the picture */
  private readonly settingId = signal<string | null>(null);
  /** '' for a length that the person states */
  protected readonly objectId = signal('ruler-class-2');
  protected readonly length = signal<number | null>(10);
  protected readonly unit = signal<(typeof this.units)[number]>('mm');
  protected readonly tolerance = signal<number | null>(null);
  protected readonly pitch = signal<number | null>(this.bench.image()?.capture.pixelPitchUm ?? null);
  protected readonly magnification = signal<number | null>(null);
  protected readonly relay = signal<number | null>(1);
  protected readonly binning = signal<number | null>(1);

  protected readonly object = computed(() => (this.objectId() === '' ? null : knownObject(this.objectId())));
  /** the length is the person's to say: a ruler has as much of it as was marked */
  protected readonly statesLength = computed(() => (this.object()?.lengthMm ?? null) === null);
  protected readonly line = this.desk.reference;
  protected readonly drawing = computed(() => this.by() === 'reference' || this.by() === 'finger');
  protected readonly ownFinger = computed(() => this.me()?.fingertipMm ?? null);
  protected readonly unknownFinger = UNKNOWN_FINGER.meanMm.toFixed(1);

  /** what is sent; null while something is missing */
  private readonly body = computed<SetScaleBody | null>(() => {
    const line = this.line();
    switch (this.by()) {
      case 'setting': {
        const settingId = this.settingId();
        return settingId === null ? null : { by: 'setting', settingId };
      }
      case 'reference':
        return line ? this.reference(line) : null;
      case 'finger':
        return line ? { by: 'finger', a: line.a, b: line.b } : null;
      case 'optics':
        return this.optics();
      case 'nothing':
        return { by: 'nothing' };
    }
  });
  protected readonly ready = computed(() => this.body() !== null && !this.refused() && !this.submission.busy());

  /** What the picture would carry; words where the domain refuses it. */
  protected readonly outcome = computed<{ readonly line: string } | { readonly refusal: string } | null>(() => {
    const body = this.body();
    if (!body) return null;
    try {
      const scale = this.scaleBy(body);
      if (!scale) return null;
      const { value, doubt } = scaleLine(scale);
      return { line: $localize`${value} per pixel ${doubt}:doubt: (k = 2)` };
    } catch (error) {
      if (error instanceof DomainError)
        return { refusal: problemWords(new ApiProblem(error.code, 422, error.parameters)) };
      throw error;
    }
  });
  private readonly refused = computed(() => {
    const outcome = this.outcome();
    return outcome !== null && 'refusal' in outcome;
  });
  /** the sizes of the picture and of the calibrated frame, until it is said what was done to the picture */
  protected readonly question = signal<Readonly<Record<string, string | number>> | null>(null);
  protected readonly problem = computed(() => {
    if (this.submission.problem()?.code === 'reduced-or-cropped') return null;
    return this.submission.field('sizeAnswer') ?? this.submission.words([]);
  });
  private readonly toQuestion = focusOnceShown('.question button');

  constructor() {
    effect(() => {
      const problem = this.submission.problem();
      if (problem?.code !== 'reduced-or-cropped') return;
      this.question.set(problem.parameters);
      this.toQuestion();
    });
  }

  protected choose(by: Way): void {
    this.by.set(by);
    this.question.set(null);
    this.submission.forget();
    if (this.drawing()) this.desk.take({ does: 'reference' });
    else if (this.desk.activity()?.does === 'reference') this.desk.putAway();
  }

  protected keepSetting(settingId: string): void {
    this.settingId.set(settingId);
    this.question.set(null);
    this.keep();
  }

  protected keep(sizeAnswer?: 'reduced' | 'cropped'): void {
    const body = this.body();
    if (!body) return;
    const answered: SetScaleBody = body.by === 'setting' && sizeAnswer ? { ...body, sizeAnswer } : body;
    this.submission.send(this.bench.setScale(answered), () => this.done.emit());
  }

  private reference(line: { a: { x: number; y: number }; b: { x: number; y: number } }): SetScaleBody | null {
    const object = this.object();
    const ends = { by: 'reference' as const, a: line.a, b: line.b, objectId: object?.id ?? null };
    if (!this.statesLength()) return ends;
    const lengthUm = this.um(this.length());
    const toleranceUm = this.um(this.tolerance());
    if (!lengthUm || lengthUm <= 0 || (toleranceUm ?? 0) < 0) return null;
    return { ...ends, lengthUm, ...(toleranceUm === null ? {} : { toleranceUm }) };
  }

  private optics(): SetScaleBody | null {
    const [pixelPitchUm, magnification, relay, binning] = [
      this.pitch(),
      this.magnification(),
      this.relay(),
      this.binning(),
    ];
    if (!pixelPitchUm || !magnification || !relay || !binning) return null;
    if (Math.min(pixelPitchUm, magnification, relay) < LEAST) return null;
    if (!Number.isInteger(binning) || binning < 1 || binning > 8) return null;
    return { by: 'optics', pixelPitchUm, magnification, relay, binning };
  }

  private scaleBy(body: SetScaleBody): Scale | null {
    switch (body.by) {
      case 'reference': {
        const object = this.object();
        const lengthUm = body.lengthUm ?? (object?.lengthMm ?? 0) * MICROMETRES_PER.mm;
        return referenceScale({
          a: body.a,
          b: body.b,
          lengthUm,
          toleranceUm: body.toleranceUm ?? (object?.toleranceMm ?? 0) * MICROMETRES_PER.mm,
        });
      }
      case 'finger': {
        const breadthMm = this.ownFinger();
        return fingerScale({
          a: body.a,
          b: body.b,
          own: breadthMm === null ? null : { breadthMm, measuredToMm: MEASURED_TO_MM },
        });
      }
      case 'optics':
        return opticsScale(body);
      case 'setting':
      case 'nothing':
        return null; // the setting's own figures stand beside its name
    }
  }

  private um(value: number | null): number | null {
    return value === null ? null : value * MICROMETRES_PER[this.unit()];
  }
}
