import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { keepRoutes } from '@shared/contracts/keep';
import { Api } from '../../core/api';
import { Empty } from '../../ui/empty/empty';
import { ProblemBox } from '../../ui/problem/problem';
import { instantWords } from './instant-words';
import { withLinks } from './with-links';

/** What Motebook has written to people, and whether it went out. */
@Component({
  selector: 'app-mail',
  imports: [Empty, ProblemBox],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './mail.html',
  styleUrls: ['./keep-table.scss', './mail.scss'],
})
export class Mail {
  private readonly api = inject(Api);

  protected readonly instantWords = instantWords;
  protected readonly openId = signal<string | null>(null);
  protected readonly mails = this.api.resource(keepRoutes.mails, () => ({}));
  protected readonly opened = this.api.resource(keepRoutes.mail, () => {
    const mailId = this.openId();
    return mailId === null ? undefined : { params: { mailId } };
  });
  protected readonly pieces = computed(() => (this.opened.error() ? [] : withLinks(this.opened.value()?.text ?? '')));
}
