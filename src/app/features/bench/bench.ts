import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  signal,
  untracked,
  viewChild,
} from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { Title } from '@angular/platform-browser';
import { Router, RouterLink } from '@angular/router';
import { mdiArrowLeft, mdiChevronLeft, mdiChevronRight, mdiRedoVariant, mdiUndoVariant } from '@mdi/js';
import type { Note } from '@shared/annotations/note';
import { plainName } from '@shared/taxonomy/name';
import { dayWords } from '../../core/day-words';
import { problemWords } from '../../core/problem-words';
import { SessionStore } from '../../core/session-store';
import { Icon } from '../../ui/icon/icon';
import { ProblemBox } from '../../ui/problem/problem';
import { TaxonName } from '../../ui/taxon-name/taxon-name';
import { BenchKeys, type BenchPage } from './bench-keys';
import { BenchPicture } from './bench-picture';
import { BenchStore } from './bench-store';
import { reagentCaution } from './cautions';
import { HintLine } from './hint-line';
import { KeptState } from './kept-state';
import { NoteStore } from './note-store';
import { PictureMenu } from './picture-menu';
import { SaidList } from './said-list';
import { ScaleCard } from './scale-card';
import { SeriesCard } from './series-card';
import { StructureList } from './structure-list';
import { ToolDesk } from './tool-desk';

/** On a phone one of them is open below the picture. */
type Sheet = 'tools' | 'scale' | 'series' | 'said';

/**
 * The bench: one picture in the dark, what it is on the left, what is known of it on the right. The
 * address may change to another picture under it; the tool in hand stays.
 */
@Component({
  selector: 'app-bench',
  imports: [
    RouterLink,
    Icon,
    ProblemBox,
    TaxonName,
    BenchPicture,
    HintLine,
    KeptState,
    PictureMenu,
    SaidList,
    ScaleCard,
    SeriesCard,
    StructureList,
  ],
  providers: [NoteStore, BenchStore, ToolDesk, BenchKeys],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './bench.html',
  styleUrl: './bench.scss',
  host: {
    '[attr.data-settled]': 'settled() ? "" : null',
    '(document:keydown)': 'keys.down($event, page)',
    '(document:keyup)': 'keys.up($event, page)',
    '(window:blur)': 'keys.letGo(page)',
  },
})
export class Bench {
  private readonly router = inject(Router);
  private readonly title = inject(Title);
  private readonly dialog = inject(MatDialog);
  private readonly desk = inject(ToolDesk);
  private readonly notes = inject(NoteStore);
  protected readonly bench = inject(BenchStore);
  protected readonly keys = inject(BenchKeys);

  readonly imageId = input.required<string>();

  private readonly picture = viewChild(BenchPicture);
  protected readonly icons = {
    back: mdiArrowLeft,
    undo: mdiUndoVariant,
    redo: mdiRedoVariant,
    left: mdiChevronLeft,
    right: mdiChevronRight,
  };
  protected readonly sheets: readonly { readonly sheet: Sheet; readonly words: string }[] = [
    { sheet: 'tools', words: $localize`Measure` },
    { sheet: 'series', words: $localize`Series` },
    { sheet: 'scale', words: $localize`Scale` },
    { sheet: 'said', words: $localize`Said` },
  ];
  protected readonly sheet = signal<Sheet | null>('tools');

  protected readonly image = this.bench.image;
  protected readonly canUndo = this.notes.canUndo;
  protected readonly canRedo = this.notes.canRedo;
  protected readonly signedIn = computed(() => this.me() !== null);
  private readonly me = inject(SessionStore).user;
  protected readonly notesProblem = computed(() => (this.notes.loaded() ? null : this.notes.problem()));
  protected readonly trouble = computed(() => {
    const trouble = this.bench.trouble();
    return trouble ? problemWords(trouble) : null;
  });
  protected readonly caution = computed(() => reagentCaution(this.bench.preparation()));
  /** slide, medium, state, day: what lies under the lens */
  protected readonly told = computed(() => {
    const [image, preparation, observation] = [this.image(), this.bench.preparation(), this.bench.observation()];
    const slide = [
      preparation?.title ?? image?.preparation?.title,
      preparation?.medium,
      preparation?.condition === 'unknown' ? '' : preparation?.condition,
    ];
    return [slide.filter(Boolean).join(', '), observation ? dayWords(observation.observedOn) : '']
      .filter(Boolean)
      .join(' · ');
  });
  private readonly place = computed(() => this.image()?.siblings.indexOf(this.imageId()) ?? -1);
  protected readonly previous = computed(() => this.image()?.siblings[this.place() - 1] ?? null);
  protected readonly next = computed(() =>
    this.place() < 0 ? null : (this.image()?.siblings[this.place() + 1] ?? null),
  );
  protected readonly zoom = computed(() => this.picture()?.canvas().viewport()?.zoom ?? null);
  protected readonly spoken = computed(() => this.picture()?.spoken() ?? '');
  /** everything is there and everything is kept: tests wait for it */
  protected readonly settled = computed(
    () =>
      this.notes.loaded() &&
      this.bench.seriesLoaded() &&
      this.notes.kept() === 'kept' &&
      !this.desk.opening() &&
      (this.picture()?.canvas().drawn() ?? false),
  );

  protected readonly page: BenchPage = pageOf(this.picture, {
    goTo: (step) => this.goTo(step),
    showKeys: () => void this.showKeys(),
    writeWords: () => this.writeWords(),
  });

  constructor() {
    effect(() => {
      const imageId = this.imageId();
      untracked(() => {
        this.bench.imageId.set(imageId);
        this.notes.open(imageId);
        this.desk.crosshair.set(null);
        this.desk.reference.set(null);
        this.desk.restart();
      });
    });
    effect(() => {
      const image = this.image();
      if (!image) return;
      const name = image.find?.name ? plainName(image.find.name) : image.title;
      this.title.setTitle([image.find?.number, name, 'Motebook'].filter(Boolean).join(' · '));
    });
  }

  protected goTo(step: 1 | -1): void {
    const to = step > 0 ? this.next() : this.previous();
    if (to !== null) void this.router.navigate(['/images', to]);
  }

  protected async showKeys(): Promise<void> {
    const { KeyHelp } = await import('./key-help');
    this.dialog.open(KeyHelp, { width: '560px', autoFocus: 'first-heading' });
  }

  /** The list opens the words of what is selected; a phone shows the list first. */
  protected writeWords(): void {
    const note = this.notes.selected();
    if (!note || note.kind === 'measure') return;
    this.sheet.set('said');
    this.desk.wantsWords.set(note.id);
  }

  protected choose(note: Note): void {
    this.picture()?.reveal(note.geometry);
  }

  protected focusPicture(): void {
    this.picture()?.canvas().focus();
  }

  protected takenUp(): void {
    // on a phone the picture gets the room of the list, once there is something to draw
    if (this.desk.activity()) this.sheet.set(null);
    this.focusPicture();
  }

  protected openSheet(sheet: Sheet): void {
    this.sheet.update((open) => (open === sheet ? null : sheet));
  }
}

function pageOf(picture: () => BenchPicture | undefined, does: Omit<BenchPage, 'picture'>): BenchPage {
  return {
    ...does,
    get picture() {
      return picture();
    },
  };
}
