import { ChangeDetectionStrategy, Component, computed, inject, linkedSignal, signal, viewChild } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatButtonModule } from '@angular/material/button';
import { MatDialog, MatDialogModule } from '@angular/material/dialog';
import { MatMenuModule } from '@angular/material/menu';
import { MatSnackBar, MatSnackBarModule } from '@angular/material/snack-bar';
import { Router, RouterLink } from '@angular/router';
import { mdiDotsVertical, mdiPlus } from '@mdi/js';
import { finalize } from 'rxjs';
import type { FindView } from '@shared/contracts/finds';
import { LIGHTS, type TrayPicture } from '@shared/contracts/images';
import { rigRoutes } from '@shared/contracts/rigs';
import { Api } from '../../../core/api';
import { toApiProblem } from '../../../core/api-problem';
import { Empty } from '../../../ui/empty/empty';
import { SHEET } from '../../../ui/forms/sheet';
import { Icon } from '../../../ui/icon/icon';
import { ProblemBox } from '../../../ui/problem/problem';
import { scaleWords } from '../rigs/calibration-words';
import { ACCEPT, droppedFiles } from '../uploads/picture-files';
import { UploadQueue } from '../uploads/upload-queue';
import { ComingIn } from './coming-in';
import { AddToFind } from './find-form/add-to-find';
import { MakeFind } from './find-form/make-find';
import { groupPictures } from './groups';
import { LIGHT_WORDS } from './light-words';
import { PictureGrid } from './picture-grid';
import { choose, keepPresent, NOTHING, type Selection } from './selection';
import { SettingGiver, type GivenSetting } from './setting-giver';
import { SizeQuestion, type SizeAnswer } from './size-question';
import { TrayStore, UNDO_MS } from './tray-store';

/** Where uploaded pictures wait until they are sorted into finds. */
@Component({
  selector: 'app-tray',
  imports: [
    RouterLink,
    MatButtonModule,
    MatDialogModule,
    MatMenuModule,
    MatSnackBarModule,
    ComingIn,
    Empty,
    Icon,
    PictureGrid,
    ProblemBox,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './tray.html',
  styleUrl: './tray.scss',
  host: {
    class: 'page',
    '(window:dragover)': 'dragOver($event)',
    '(window:dragleave)': 'dragLeave($event)',
    '(window:drop)': 'drop($event)',
  },
})
export class Tray {
  protected readonly tray = inject(TrayStore);
  protected readonly queue = inject(UploadQueue);
  private readonly dialog = inject(MatDialog);
  private readonly snackBar = inject(MatSnackBar);
  private readonly router = inject(Router);
  private readonly giver = inject(SettingGiver);
  private readonly grid = viewChild(PictureGrid);
  private readonly rigs = inject(Api).resource(rigRoutes.list, () => ({}));

  protected readonly icons = { add: mdiPlus, more: mdiDotsVertical };
  protected readonly accept = ACCEPT;
  protected readonly lightChoices = LIGHTS;
  protected readonly lightWords = LIGHT_WORDS;
  protected readonly dragging = signal(false);

  protected readonly groups = computed(() => groupPictures(this.tray.ready()));
  /** pictures that left the tray are let go */
  protected readonly selection = linkedSignal<readonly TrayPicture[], Selection>({
    source: this.tray.ready,
    computation: (ready, before) =>
      before
        ? keepPresent(
            before.value,
            ready.map(({ id }) => id),
          )
        : NOTHING,
  });
  /** in the order that is seen */
  protected readonly chosen = computed(() =>
    this.groups().flatMap(({ pictures }) => pictures.filter(({ id }) => this.selection().ids.has(id))),
  );
  protected readonly allReference = computed(() => this.chosen().every(({ role }) => role === 'reference'));
  /** what was taken with which setting: each with the scale that holds, or with the want of one */
  protected readonly settingChoices = computed(() => {
    const rigs = this.rigs.error() ? [] : (this.rigs.value() ?? []);
    return rigs.flatMap((rig) =>
      rig.settings.map(({ id, name, calibration }) => ({
        id,
        name,
        rig: rig.name,
        scale: calibration ? scaleWords(calibration) : $localize`not calibrated yet`,
      })),
    );
  });
  protected readonly busy = signal(false);
  protected readonly underUltraviolet = computed(() => this.chosen().some(({ light }) => light === 'ultraviolet'));

  constructor() {
    this.tray.live.pipe(takeUntilDestroyed()).subscribe();
    void this.queue.lookForBrokenOff();
  }

  protected bringChosen(input: HTMLInputElement): void {
    this.queue.add([...(input.files ?? [])]);
    input.value = ''; // so that the same files can be chosen again
  }

  protected dragOver(event: DragEvent): void {
    if (!event.dataTransfer?.types.includes('Files')) return;
    event.preventDefault();
    this.dragging.set(true);
  }

  protected dragLeave(event: DragEvent): void {
    if (event.relatedTarget === null) this.dragging.set(false); // out of the window
  }

  protected drop(event: DragEvent): void {
    this.dragging.set(false);
    if (!event.dataTransfer?.types.includes('Files')) return;
    event.preventDefault();
    void droppedFiles(event.dataTransfer).then((files) => this.queue.add(files));
  }

  protected chooseAll(): void {
    this.selection.set(choose(this.groups().flatMap(({ pictures }) => pictures.map(({ id }) => id))));
  }

  protected chooseNone(): void {
    this.selection.set(NOTHING);
  }

  protected makeFind(): void {
    this.openSheet(MakeFind, (find, count) =>
      count === 1
        ? $localize`${find.number}:number: made of 1 picture.`
        : $localize`${find.number}:number: made of ${count}:count: pictures.`,
    );
  }

  protected addToFind(): void {
    this.openSheet(AddToFind, (find) => $localize`Added to ${find.number}:number:.`);
  }

  protected setLight(light: TrayPicture['light']): void {
    this.tray.edit(this.selection().ids, { light });
  }

  protected setRole(role: TrayPicture['role']): void {
    this.tray.edit(this.selection().ids, { role });
  }

  protected giveSetting(settingId: string): void {
    const ask = (count: number) =>
      this.dialog.open<SizeQuestion, number, SizeAnswer>(SizeQuestion, { width: '460px', data: count }).afterClosed();
    if (this.busy()) return;
    this.busy.set(true);
    this.giver
      .give(this.chosen(), settingId, ask)
      .pipe(finalize(() => this.busy.set(false)))
      .subscribe({
        next: (given) => {
          this.tray.refresh();
          this.snackBar.open(givenWords(given), undefined, { duration: 8_000 });
        },
        error: (error: unknown) => this.tray.problem.set(toApiProblem(error)),
      });
  }

  protected discard(): void {
    const ids = this.chosen().map(({ id }) => id);
    this.tray.discard(ids);
    this.grid()?.focus();
    const said =
      ids.length === 1 ? $localize`1 picture discarded.` : $localize`${ids.length}:count: pictures discarded.`;
    this.snackBar
      .open(said, $localize`Undo`, { duration: UNDO_MS })
      .onAction()
      .subscribe(() => this.tray.keep(ids));
  }

  private openSheet(sheet: typeof MakeFind | typeof AddToFind, words: (find: FindView, count: number) => string): void {
    const pictures = this.chosen();
    this.dialog
      .open<MakeFind | AddToFind, readonly TrayPicture[], FindView>(sheet, { ...SHEET, data: pictures })
      .afterClosed()
      .subscribe((find) => {
        if (!find) return;
        this.tray.tookOut(pictures.map(({ id }) => id));
        this.grid()?.focus();
        this.snackBar
          .open(words(find, pictures.length), $localize`Open it`, { duration: 8_000 })
          .onAction()
          .subscribe(() => void this.router.navigate(['/finds', find.id]));
      });
  }
}

function givenWords({ scaled, waiting, left }: GivenSetting): string {
  return [
    scaled > 0 ? $localize`${scaled}:count: with a scale.` : '',
    waiting > 0 ? $localize`${waiting}:count: wait until this setting is calibrated.` : '',
    left > 0 ? $localize`${left}:count: left without a scale.` : '',
  ]
    .filter(Boolean)
    .join(' ');
}
