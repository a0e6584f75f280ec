import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  type ElementRef,
  inject,
  output,
  signal,
  viewChild,
} from '@angular/core';
import { structureOf } from '@shared/annotations/structures';
import { structureWords } from '../../core/structure-words';
import { BenchStore } from './bench-store';
import { NoteStore } from './note-store';
import { KNOWN_STRUCTURES, POINT_KEY, ROUND_KEY, STRUCTURE_KEYS, structureNamed, wayWords } from './structure-keys';
import { ToolDesk, type Activity } from './tool-desk';

/** *What is it?* and *Say something*: what the hand can be for. */
@Component({
  selector: 'app-structure-list',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './structure-list.html',
  styleUrl: './structure-list.scss',
})
export class StructureList {
  private readonly bench = inject(BenchStore);
  private readonly notes = inject(NoteStore);
  private readonly desk = inject(ToolDesk);

  /** something was taken up: the picture should have the keyboard */
  readonly taken = output<void>();

  protected readonly mayMeasure = this.bench.mayMeasure;
  protected readonly mayAnnotate = this.bench.mayAnnotate;
  protected readonly keys = { point: POINT_KEY, round: ROUND_KEY };
  protected readonly naming = signal(false);
  private readonly all = signal(false);
  private readonly nameField = viewChild<ElementRef<HTMLInputElement>>('name');

  protected readonly rows = computed(() => {
    const activity = this.desk.activity();
    const listed = this.bench.structures();
    const more = this.all()
      ? KNOWN_STRUCTURES.filter((id) => !listed.some((one) => one.id === id)).map((id) => ({ id, count: 0 }))
      : [];
    return [...listed, ...more].map(({ id, count }) => ({
      id,
      name: structureWords(id),
      way: wayWords(id),
      key: STRUCTURE_KEYS[id] ?? null,
      count: countWords(count, structureOf(id)?.wanted ?? 0),
      inHand: activity?.does === 'measure' && activity.structure === id,
    }));
  });
  protected readonly hasMore = computed(() => !this.all() && this.rows().length < KNOWN_STRUCTURES.length);
  protected readonly pointed = computed(() => this.notes.countOf('point'));
  protected readonly rounded = computed(() => this.notes.countOf('round'));
  protected readonly saying = computed(() => this.desk.activity()?.does ?? null);

  constructor() {
    // the field appears because it was asked for: the keyboard goes there
    effect(() => this.nameField()?.nativeElement.focus());
  }

  protected measure(structure: string): void {
    const activity = this.desk.activity();
    // a second touch puts it away: so one gets back to moving the picture without a key
    if (activity?.does === 'measure' && activity.structure === structure) this.desk.putAway();
    else this.desk.take({ does: 'measure', structure });
    this.taken.emit();
  }

  /** Without the right to draw, a structure only chooses whose numbers are shown. */
  protected show(structure: string): void {
    this.bench.structure.set(structure);
  }

  protected say(does: Extract<Activity['does'], 'point' | 'round'>): void {
    if (this.desk.activity()?.does === does) this.desk.putAway();
    else this.desk.take({ does });
    this.taken.emit();
  }

  protected showAll(): void {
    this.all.set(true);
  }

  protected nameAnother(): void {
    this.naming.set(true);
  }

  protected takeNamed(event: Event, words: string): void {
    event.preventDefault();
    const structure = structureNamed(words);
    this.naming.set(false);
    if (structure) this.measure(structure);
  }
}

/** '12 of 30' while more are wanted, then the number; an en dash for none. */
function countWords(count: number, wanted: number): string {
  if (count === 0) return '–';
  return count < wanted ? $localize`${count} of ${wanted}:wanted:` : String(count);
}
