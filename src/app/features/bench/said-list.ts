import {
  ChangeDetectionStrategy,
  Component,
  computed,
  type ElementRef,
  effect,
  inject,
  output,
  viewChild,
} from '@angular/core';
import { mdiTrashCanOutline } from '@mdi/js';
import type { Note } from '@shared/annotations/note';
import { structureWords } from '../../core/structure-words';
import { SessionStore } from '../../core/session-store';
import { Icon } from '../../ui/icon/icon';
import { BenchStore } from './bench-store';
import { measureWords } from './measure-words';
import { NoteStore } from './note-store';
import { saidNotes } from './said-notes';
import { ToolDesk } from './tool-desk';

/** Everything on the picture as text: read, worded, selected, taken away without the picture. */
@Component({
  selector: 'app-said-list',
  imports: [Icon],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './said-list.html',
  styleUrl: './said-list.scss',
})
export class SaidList {
  private readonly notes = inject(NoteStore);
  private readonly bench = inject(BenchStore);
  private readonly desk = inject(ToolDesk);
  private readonly me = inject(SessionStore).user;

  /** a note was chosen: the picture brings it into sight */
  readonly chosen = output<Note>();
  /** the words are written */
  readonly worded = output<void>();

  protected readonly bin = mdiTrashCanOutline;
  protected readonly withoutWords = $localize`without words`;
  protected readonly words = viewChild<ElementRef<HTMLTextAreaElement>>('words');
  protected readonly mayAnnotate = this.bench.mayAnnotate;
  protected readonly said = computed(() =>
    saidNotes(this.notes.notes()).map(({ note, number }) => ({
      note,
      number,
      author: this.notes.authorOf(note),
      mine: this.isMine(note),
      open: this.notes.selected()?.id === note.id,
    })),
  );
  protected readonly measured = computed(() =>
    this.notes
      .notes()
      .filter(({ kind }) => kind === 'measure')
      .map((note, i) => {
        const structure = this.bench.structureOf(note);
        const name = $localize`${structureWords(structure ?? '')} ${i + 1}:number:`;
        return {
          note,
          mine: this.isMine(note),
          open: this.notes.selected()?.id === note.id,
          name,
          removal: $localize`Take ${name}:what: away`,
          size: measureWords(note.geometry, structure, this.bench.scale()).join(', '),
        };
      }),
  );

  constructor() {
    effect(() => {
      const wanted = this.desk.wantsWords();
      const field = this.words()?.nativeElement;
      // the field of the note before may still stand when a new one wants words
      if (wanted === null || field?.dataset['note'] !== wanted) return;
      field.focus();
      this.desk.wantsWords.set(null);
    });
  }

  protected choose(note: Note): void {
    this.notes.select(this.notes.selected()?.id === note.id ? null : note.id);
    this.chosen.emit(note);
  }

  protected word(note: Note, text: string): void {
    const words = text.trim();
    if (words !== note.text) this.notes.word(note.id, words);
  }

  /** Enter is done; Shift and Enter begins another line. */
  protected enter(event: Event, note: Note, text: string): void {
    if (!(event instanceof KeyboardEvent) || event.shiftKey) return;
    event.preventDefault();
    this.word(note, text);
    this.worded.emit();
  }

  protected leave(event: Event): void {
    event.stopPropagation();
    this.worded.emit();
  }

  protected remove(note: Note): void {
    this.notes.remove(note.id);
    this.worded.emit();
  }

  private isMine(note: Note): boolean {
    return this.mayAnnotate() && note.layer === this.me()?.id;
  }
}
