import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import type { TrayPicture } from '@shared/contracts/images';
import { ApiProblem } from '../../../core/api-problem';
import { problemWords } from '../../../core/problem-words';
import { Rule } from '../../../ui/rule/rule';
import { UploadQueue } from '../uploads/upload-queue';
import { byteWords } from './byte-words';
import { TrayStore } from './tray-store';

/** Names beyond these are counted instead. */
const MOST_NAMES = 3;

/** What is on its way in, and what was not taken, with why and what can be done. */
@Component({
  selector: 'app-coming-in',
  imports: [MatButtonModule, Rule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './coming-in.html',
  styleUrl: './coming-in.scss',
})
export class ComingIn {
  protected readonly queue = inject(UploadQueue);
  protected readonly tray = inject(TrayStore);
  protected readonly bytes = byteWords;

  protected readonly fraction = this.queue.progress;
  protected readonly travelling = computed(() => this.queue.active().filter(({ state }) => state !== 'waiting'));
  protected readonly waiting = computed(() => this.queue.active().length - this.travelling().length);
  protected readonly summary = computed(() => {
    const done = this.queue.done().length;
    const all = done + this.queue.active().length;
    const reading = this.tray.beingRead().length;
    const sentence = $localize`${done}:done: of ${all}:all: files are here`;
    return reading > 0 ? $localize`${sentence}:sentence:, ${reading}:reading: being read` : sentence;
  });
  protected readonly brokenNames = computed(() => {
    const names = this.queue.brokenOff().map(({ name }) => name);
    const more = names.length - MOST_NAMES;
    return names.slice(0, MOST_NAMES).join(', ') + (more > 0 ? $localize` and ${more}:count: more` : '');
  });
  protected readonly retryable = computed(
    () =>
      this.queue.failed().filter((upload) => this.queue.canRetry(upload)).length +
      this.tray.refused().filter((picture) => this.mayHelp(picture)).length,
  );

  protected wordsOf(problem: ApiProblem | null): string {
    return problem ? problemWords(problem) : '';
  }

  protected refusalWords({ refusal }: TrayPicture): string {
    return problemWords(new ApiProblem(refusal?.code ?? 'intake-failed', 422, refusal?.parameters));
  }

  /** Whether reading the same bytes again may end otherwise. */
  protected mayHelp({ refusal }: TrayPicture): boolean {
    return refusal === null || refusal.code === 'took-too-long' || refusal.code === 'intake-failed';
  }

  protected cancelLabel(name: string): string {
    return $localize`Stop ${name}`;
  }

  protected retryAll(): void {
    this.queue.retryAll();
    this.tray
      .refused()
      .filter((picture) => this.mayHelp(picture))
      .forEach((picture) => this.tray.retry(picture));
  }

  protected discardAll(): void {
    this.queue.failed().forEach(({ key }) => this.queue.cancel(key));
    this.tray.discard(this.tray.refused().map(({ id }) => id));
  }
}
