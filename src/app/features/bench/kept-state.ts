import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { problemWords } from '../../core/problem-words';
import { NoteStore } from './note-store';

/** Whether everything drawn is safe with the server; where not, why, and what one can do. */
@Component({
  selector: 'app-kept-state',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <span role="status" [class.not]="state() === 'offline' || state() === 'refused'">{{ words() }}</span>
    @if (state() === 'offline' || state() === 'refused') {
      <button type="button" (click)="retry()" i18n>Try again</button>
    }
    @if (state() === 'refused') {
      <button type="button" (click)="letGo()" i18n>Let it go</button>
    }
  `,
  styles: `
    :host {
      display: flex;
      align-items: center;
      gap: 10px;
      color: var(--ink-soft);
      font-size: 0.9375rem;
    }
    .not {
      color: var(--warn);
    }
    button {
      min-height: 32px;
      padding: 0 4px;
      border: 0;
      background: none;
      color: var(--rust);
      font: inherit;
      white-space: nowrap;
      cursor: pointer;
    }
  `,
})
export class KeptState {
  private readonly notes = inject(NoteStore);

  protected readonly state = this.notes.kept;
  protected readonly words = computed(() => {
    switch (this.state()) {
      case 'kept':
        return $localize`all kept`;
      case 'keeping':
        return $localize`keeping…`;
      case 'offline':
        return $localize`${this.notes.unsent()}:count: not kept yet: no connection`;
      case 'refused': {
        const problem = this.notes.problem();
        return $localize`not kept: ${problem ? problemWords(problem) : ''}`;
      }
    }
  });

  protected retry(): void {
    this.notes.retry();
  }

  protected letGo(): void {
    this.notes.letGo();
  }
}
