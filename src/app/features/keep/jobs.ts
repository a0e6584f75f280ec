import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { keepRoutes, type JobRow } from '@shared/contracts/keep';
import { Api } from '../../core/api';
import { toApiProblem, type ApiProblem } from '../../core/api-problem';
import { Empty } from '../../ui/empty/empty';
import { ProblemBox } from '../../ui/problem/problem';
import { instantWords } from './instant-words';

const STATE_WORDS: Readonly<Record<JobRow['state'], string>> = {
  waiting: $localize`waiting`,
  working: $localize`being done`,
  done: $localize`done`,
  failed: $localize`failed`,
};

const KIND_WORDS: Readonly<Record<string, string>> = {
  intake: $localize`take a picture in`,
  mail: $localize`send a mail`,
  'forget-files': $localize`clear the files of a discarded picture`,
};

/** What needs the keeper comes first. */
const ORDER: readonly JobRow['state'][] = ['failed', 'working', 'waiting', 'done'];

/** Work in the background, the failed first, with why. */
@Component({
  selector: 'app-jobs',
  imports: [MatButtonModule, Empty, ProblemBox],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './jobs.html',
  styleUrl: './keep-table.scss',
})
export class Jobs {
  private readonly api = inject(Api);

  protected readonly stateWords = STATE_WORDS;
  protected readonly instantWords = instantWords;
  protected readonly jobs = this.api.resource(keepRoutes.jobs, () => ({}));
  protected readonly problem = signal<ApiProblem | null>(null);
  protected readonly shown = computed(() =>
    (this.jobs.error() ? [] : (this.jobs.value() ?? [])).toSorted(
      (a, b) => ORDER.indexOf(a.state) - ORDER.indexOf(b.state),
    ),
  );
  protected readonly summary = computed(() =>
    ORDER.map((state) => ({ state, count: this.shown().filter((job) => job.state === state).length }))
      .filter(({ count }) => count > 0)
      .map(({ state, count }) => `${count} ${STATE_WORDS[state]}`)
      .join(' · '),
  );

  /** a kind that is new here is shown as the server calls it */
  protected kindWords(kind: string): string {
    return KIND_WORDS[kind] ?? kind;
  }

  protected retry(jobId: string): void {
    this.problem.set(null);
    this.api.call(keepRoutes.retryJob, { params: { jobId } }).subscribe({
      next: (again) => this.jobs.update((all) => all?.map((job) => (job.id === again.id ? again : job))),
      error: (error: unknown) => this.problem.set(toApiProblem(error)),
    });
  }
}
