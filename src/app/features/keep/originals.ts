import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatProgressBarModule } from '@angular/material/progress-bar';
import { keepRoutes, type IntegrityView } from '@shared/contracts/keep';
import { Api } from '../../core/api';
import { toApiProblem, type ApiProblem } from '../../core/api-problem';
import { ProblemBox } from '../../ui/problem/problem';
import { instantWords } from './instant-words';

/** Whether every original is still what was brought in. */
@Component({
  selector: 'app-originals',
  imports: [MatButtonModule, MatProgressBarModule, ProblemBox],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './originals.html',
  styles: `
    .lead {
      max-width: var(--measure);
    }
    .well {
      color: var(--lichen-ink);
    }
    .wrong {
      color: var(--warn);
    }
  `,
})
export class Originals {
  private readonly api = inject(Api);

  protected readonly instantWords = instantWords;
  protected readonly checking = signal(false);
  protected readonly result = signal<IntegrityView | null>(null);
  protected readonly problem = signal<ApiProblem | null>(null);
  /** decimal, as disks are sold */
  protected readonly bytes = computed(() => {
    const megabytes = (this.result()?.bytes ?? 0) / 1e6;
    return megabytes < 1000 ? `${megabytes.toFixed(megabytes < 10 ? 1 : 0)} MB` : `${(megabytes / 1000).toFixed(1)} GB`;
  });

  protected check(): void {
    if (this.checking()) return;
    this.checking.set(true);
    this.problem.set(null);
    this.result.set(null);
    this.api.call(keepRoutes.checkIntegrity, {}).subscribe({
      next: (result) => {
        this.result.set(result);
        this.checking.set(false);
      },
      error: (error: unknown) => {
        this.problem.set(toApiProblem(error));
        this.checking.set(false);
      },
    });
  }
}
