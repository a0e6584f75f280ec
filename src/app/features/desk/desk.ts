import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatButtonModule } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { findRoutes } from '@shared/contracts/finds';
import { rigRoutes } from '@shared/contracts/rigs';
import { Api } from '../../core/api';
import { dayWords } from '../../core/day-words';
import { Empty } from '../../ui/empty/empty';
import { Picture } from '../../ui/picture/picture';
import { ProblemBox } from '../../ui/problem/problem';
import { Rule } from '../../ui/rule/rule';
import { TaxonName } from '../../ui/taxon-name/taxon-name';
import { nextSteps } from './next-steps';
import { scaleWords } from './rigs/calibration-words';
import { VISIBILITY_WORDS } from './tray/find-form/place-words';
import { TrayStore } from './tray/tray-store';

/** Pictures on the strip; those that do not fit the width are not shown. */
const STRIP = 10;

/** A person's own place: what waits, what is theirs, what to do next. */
@Component({
  selector: 'app-desk',
  imports: [RouterLink, MatButtonModule, Empty, Picture, ProblemBox, Rule, TaxonName],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './desk.html',
  styleUrl: './desk.scss',
  host: { class: 'page' },
})
export class Desk {
  private readonly api = inject(Api);
  protected readonly tray = inject(TrayStore);

  protected readonly dayWords = dayWords;
  protected readonly scaleWords = scaleWords;
  protected readonly visibilityWords = VISIBILITY_WORDS;
  protected readonly finds = this.api.resource(findRoutes.mine, () => ({}));
  protected readonly rigs = this.api.resource(rigRoutes.list, () => ({}));
  // a resource's value throws while it has an error
  protected readonly findRows = computed(() => (this.finds.error() ? [] : (this.finds.value() ?? [])));
  protected readonly rigRows = computed(() => (this.rigs.error() ? [] : (this.rigs.value() ?? [])));
  protected readonly waitingCount = computed(() => this.tray.ready().length + this.tray.beingRead().length);
  protected readonly waiting = computed(() =>
    this.tray
      .ready()
      .flatMap(({ image }) => image ?? [])
      .slice(0, STRIP),
  );
  protected readonly nextSteps = computed(() =>
    nextSteps({ waiting: this.tray.ready().length, finds: this.findRows(), rigs: this.rigRows() }),
  );

  constructor() {
    this.tray.live.pipe(takeUntilDestroyed()).subscribe();
  }
}
