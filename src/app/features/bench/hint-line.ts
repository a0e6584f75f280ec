import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { structureOf } from '@shared/annotations/structures';
import { GREEN_NM } from '@shared/scale/optics';
import { structureWords } from '../../core/structure-words';
import { BenchStore } from './bench-store';
import { ToolDesk } from './tool-desk';
import type { Awaits } from './tools/tool';

/** The bottom line: what the tool in hand wants, what the optics resolve, how near one is. */
@Component({
  selector: 'app-hint-line',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <p class="hint">
      @if (hint(); as hint) {
        <b>{{ hint.what }}</b> {{ hint.wants }}
        @if (alone()) {
          <span class="wide" i18n> Escape leaves the length alone.</span>
        }
      } @else {
        <ng-container i18n>Drag to move, wheel or two fingers to zoom.</ng-container>
        @if (siblings()) {
          <span class="wide" i18n> Left and right arrow: the other pictures of this slide.</span>
        }
      }
    </p>
    @if (resolves(); as um) {
      <p class="wide numbers" [title]="resolvesWhy" i18n>optics resolve {{ um }} µm</p>
    }
    @if (zoom(); as zoom) {
      <p class="numbers zoom">
        <ng-container i18n>zoom</ng-container> <b>{{ zoom }}</b>
      </p>
    }
    <button type="button" class="wide" (click)="help.emit()" i18n>Keys</button>
  `,
  styles: `
    :host {
      display: flex;
      align-items: center;
      gap: 0 24px;
      min-height: 40px;
      padding: 0 16px;
      border-top: 1px solid var(--line);
      color: var(--ink-soft);
      font-size: 0.9375rem;
    }
    p {
      margin: 0;
      white-space: nowrap;
    }
    .hint {
      flex: 1;
      min-width: 0;
      overflow: hidden;
      text-overflow: ellipsis;
    }
    b {
      color: var(--ink);
      font-weight: 600;
    }
    .zoom {
      display: flex;
      justify-content: flex-end;
      gap: 0.4em;
      min-width: 6.4em;
      text-align: right;
    }
    button {
      min-height: 32px;
      padding: 0 4px;
      border: 0;
      background: none;
      color: var(--rust);
      font: inherit;
      cursor: pointer;
    }
    @media (max-width: 859px) {
      :host {
        min-height: 48px; /* two lines: a longer hint must not move the picture under the finger */
      }
      .wide {
        display: none;
      }
      .hint {
        white-space: normal;
        line-height: 1.25;
      }
    }
  `,
})
export class HintLine {
  private readonly bench = inject(BenchStore);
  private readonly desk = inject(ToolDesk);

  /** view px per image px */
  readonly scale = input.required<number | null>();
  readonly help = output<void>();

  protected readonly siblings = computed(() => (this.bench.image()?.siblings.length ?? 0) > 1);
  protected readonly resolves = computed(() => this.bench.image()?.resolutionUm?.toPrecision(2) ?? null);
  protected readonly resolvesWhy = $localize`Nearer than that, two points run together at ${GREEN_NM}:wavelength: nm; sizes are known finer`;
  protected readonly zoom = computed(() => {
    const scale = this.scale();
    return scale === null ? null : `${scale < 0.1 ? (scale * 100).toFixed(1) : Math.round(scale * 100)} %`;
  });
  /** a body's length is drawn, and its width may be left out */
  protected readonly alone = computed(() => this.desk.awaits() === 'across');
  protected readonly hint = computed(() => {
    const [activity, awaits] = [this.desk.activity(), this.desk.awaits()];
    if (!activity || !awaits) return null;
    switch (activity.does) {
      case 'point':
        return {
          what: $localize`Point at it:`,
          wants: $localize`click on it, or drag from it to where the words shall stand`,
        };
      case 'round':
        return {
          what: $localize`Draw round it:`,
          wants:
            awaits === 'start'
              ? $localize`trace it, or click corner by corner`
              : $localize`click on; Enter or the first corner closes it`,
        };
      case 'reference':
        return {
          what: $localize`Known size:`,
          wants: awaits === 'start' ? $localize`draw from one end to the other` : $localize`now its other end`,
        };
      case 'measure':
        return { what: `${structureWords(activity.structure)}:`, wants: measureHint(activity.structure, awaits) };
    }
  });
}

function measureHint(structure: string, awaits: Awaits): string {
  const way = structureOf(structure)?.way;
  switch (awaits) {
    case 'start':
      if (way === 'along-then-across') return $localize`drag along it, then across`;
      if (way === 'along-bend') return $localize`trace along its bend, or click point by point`;
      return way === 'across' ? $localize`drag across it` : $localize`drag along it`;
    case 'end':
      return $localize`now its other end`;
    case 'across':
      return $localize`now across it.`;
    case 'across-end':
      return $localize`now the other edge`;
    case 'next-point':
      return $localize`click on along it; Enter or a double click ends it`;
  }
}
