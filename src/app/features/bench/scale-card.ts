import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { focusOnceShown } from '../../core/focus-once-shown';
import { BenchStore } from './bench-store';
import { ScaleEvidence } from './scale-evidence';
import { groundsLine, scaleLine } from './scale-words';
import { SetScale } from './set-scale';
import { ToolDesk } from './tool-desk';

/** The scale on one line; *How sure is this?* one touch away, and setting it for the owner. */
@Component({
  selector: 'app-scale-card',
  imports: [MatButtonModule, RouterLink, ScaleEvidence, SetScale],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h2 i18n>Scale</h2>
    @if (line(); as line) {
      <p class="value">
        <b class="numbers">{{ line.value }}</b> <span i18n>per pixel</span>
        <span class="numbers"> {{ line.doubt }}</span> <span class="soft" i18n> (k = 2)</span>
      </p>
      @if (line.axes) {
        <p class="numbers small">{{ line.axes }}</p>
      }
    } @else {
      <p class="value"><b i18n>No scale</b></p>
      <p class="small soft" i18n>Lengths are in the picture's own pixels; only ratios can be compared.</p>
    }
    @if (view(); as view) {
      <p class="small soft">{{ grounds() }}</p>
      <button type="button" class="link" [attr.aria-expanded]="asked()" (click)="asked.set(!asked())" i18n>
        How sure is this?
      </button>
      @if (asked()) {
        <app-scale-evidence [view]="view" />
      }
    }
    @if (mayEdit()) {
      @if (setting()) {
        <app-set-scale (done)="close()" />
      } @else {
        <button type="button" class="link set" (click)="set()">{{ view() ? changeWords : setWords }}</button>
        @if (isReference()) {
          <a class="link" routerLink="/desk/rigs" [queryParams]="{ image: imageId() }" i18n
            >Calibrate a setting with it…</a
          >
        }
      }
    }
  `,
  styleUrl: './scale-card.scss',
})
export class ScaleCard {
  private readonly bench = inject(BenchStore);
  private readonly desk = inject(ToolDesk);
  private readonly toPanel = focusOnceShown('app-set-scale input');
  private readonly toButton = focusOnceShown('.set');

  protected readonly changeWords = $localize`Change the scale…`;
  protected readonly setWords = $localize`Say what the scale is…`;
  protected readonly mayEdit = this.bench.mayEdit;
  protected readonly imageId = computed(() => this.bench.image()?.id);
  protected readonly isReference = computed(() => this.bench.image()?.role === 'reference');
  protected readonly view = computed(() => this.bench.image()?.currentScale ?? null);
  protected readonly line = computed(() => {
    const scale = this.bench.scale();
    return scale ? scaleLine(scale) : null;
  });
  protected readonly grounds = computed(() => {
    const view = this.view();
    return view ? groundsLine(view) : '';
  });
  protected readonly asked = signal(false);
  protected readonly setting = signal(false);

  /** The panel takes the room of the evidence. */
  protected set(): void {
    this.asked.set(false);
    this.setting.set(true);
    this.toPanel();
  }

  protected close(): void {
    this.setting.set(false);
    if (this.desk.activity()?.does === 'reference') this.desk.putAway();
    this.toButton();
  }
}
