import { inject, Injectable, signal } from '@angular/core';
import { px, type ImagePoint } from '@shared/geometry/points';
import type { BenchPicture } from './bench-picture';
import { BenchStore } from './bench-store';
import { KeySwitch } from './key-switch';
import { NoteStore } from './note-store';
import { POINT_KEY, ROUND_KEY, STRUCTURE_KEYS } from './structure-keys';
import { ToolDesk } from './tool-desk';

/** What the keys of the bench ask of the page around it. */
export interface BenchPage {
  readonly picture: BenchPicture | undefined;
  /** to the next (1) or the previous (−1) picture of the slide */
  goTo(step: 1 | -1): void;
  showKeys(): void;
  /** to the words of the selected note */
  writeWords(): void;
}

const ARROWS: Readonly<Record<string, readonly [number, number]>> = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, -1],
  ArrowDown: [0, 1],
};
const ZOOM_STEP = 1.5;
/** A keyboard's unrest, view px: nearer than that is the same place. */
const SLOP = 3;
const STRUCTURE_OF_KEY = new Map(Object.entries(STRUCTURE_KEYS).map(([structure, key]) => [key, structure]));

/** Every key of the bench. Fields and buttons keep their own keys. */
@Injectable()
export class BenchKeys {
  private readonly bench = inject(BenchStore);
  private readonly notes = inject(NoteStore);
  private readonly desk = inject(ToolDesk);
  private readonly letters = inject(KeySwitch);

  private readonly space = signal(false);
  /** Space is held and no cross-hair stands: the mouse moves the picture */
  readonly panning = this.space.asReadonly();

  down(event: KeyboardEvent, page: BenchPage): void {
    if (event.defaultPrevented || isTyping(event.target)) return;
    if (this.obey(event, page)) event.preventDefault();
  }

  up({ key }: KeyboardEvent, page: BenchPage): void {
    if (key === ' ') this.space.set(false);
    if (key in ARROWS) page.picture?.keepNudge();
  }

  /** The window lost the keyboard: what is held is held no more. */
  letGo(page: BenchPage): void {
    this.space.set(false);
    page.picture?.keepNudge();
  }

  /** @returns whether the key meant something here */
  private obey(event: KeyboardEvent, page: BenchPage): boolean {
    const key = event.key;
    if (event.ctrlKey || event.metaKey) return this.command(event);
    if (key === 'Escape') return this.escape();
    if (key === 'Tab') return page.picture?.canvas().hasFocus === true && this.toNote(event.shiftKey ? -1 : 1, page);
    const control = isControl(event.target);
    const arrow = ARROWS[key];
    if (arrow) return !control && this.arrow(arrow, event, page);
    if (key === ' ' || key === 'Enter') return !control && this.place(key, page);
    if (key === 'PageDown' || key === 'PageUp') return did(() => page.goTo(key === 'PageDown' ? 1 : -1));
    if (event.altKey) return false;
    if (key === 'Delete' || key === 'Backspace') return this.remove();
    return this.letters.on() && this.letter(key, page);
  }

  private command({ key, shiftKey }: KeyboardEvent): boolean {
    const letter = key.toLowerCase();
    if (letter !== 'z' && letter !== 'y') return false;
    return did(() => (letter === 'y' || shiftKey ? this.redo() : this.undo()));
  }

  undo(): void {
    this.desk.restart();
    this.notes.undo();
  }

  redo(): void {
    this.desk.restart();
    this.notes.redo();
  }

  private escape(): boolean {
    if (this.desk.crosshair() && !this.desk.busy()) this.desk.crosshair.set(null);
    if (!this.desk.cancel()) this.notes.select(null);
    return true;
  }

  private arrow([x, y]: readonly [number, number], event: KeyboardEvent, page: BenchPage): boolean {
    const { picture } = page;
    const viewport = picture?.canvas().viewport();
    if (!picture || !viewport) return false;
    const factor = event.shiftKey ? 10 : event.altKey ? 0.1 : 1;
    if (this.desk.activity()) {
      // a picture seen from afar is walked by pixels of the screen
      const step = factor * Math.max(1, viewport.toImageLength(1));
      const from = this.desk.crosshair() ?? viewport.centre;
      this.moveCrosshair(this.desk.crosshair() ? px(from.x + x * step, from.y + y * step) : from, page);
      return true;
    }
    if (this.notes.selected() && picture.held()) return did(() => picture.nudge(x * factor, y * factor));
    if (event.altKey) return false;
    if (y !== 0) return did(() => picture.canvas().panBy(0, -y * 80));
    return did(() => page.goTo(x > 0 ? 1 : -1));
  }

  private moveCrosshair(to: ImagePoint, { picture }: BenchPage): void {
    const image = this.bench.image();
    const viewport = picture?.canvas().viewport();
    if (!image || !picture || !viewport) return;
    const at = px(Math.min(image.width, Math.max(0, to.x)), Math.min(image.height, Math.max(0, to.y)));
    this.desk.crosshair.set(at);
    this.desk.point('move', at, viewport.toImageLength(SLOP));
    picture.canvas().reveal(at);
  }

  /** Space and Enter set a point; Enter ends what has many points, or leads to the words of a note. */
  private place(key: string, page: BenchPage): boolean {
    const at = this.desk.crosshair();
    const viewport = page.picture?.canvas().viewport();
    if (key === 'Enter' && this.desk.awaits() === 'next-point') return did(() => this.desk.finish());
    if (at && viewport) {
      const slop = viewport.toImageLength(SLOP);
      return did(() => {
        this.desk.point('down', at, slop);
        this.desk.point('up', at, slop);
      });
    }
    if (key === ' ') return did(() => this.space.set(true));
    if (this.desk.activity() && viewport) return did(() => this.moveCrosshair(viewport.centre, page));
    return this.notes.selected() !== null && did(() => page.writeWords());
  }

  private remove(): boolean {
    if (this.desk.busy()) return did(() => this.desk.tell('back'));
    const note = this.notes.selected();
    if (!note || !this.bench.mayAnnotate()) return false;
    return did(() => this.notes.remove(note.id));
  }

  private letter(key: string, page: BenchPage): boolean {
    const canvas = page.picture?.canvas();
    if (key === '+' || key === '=') return did(() => canvas?.zoomBy(ZOOM_STEP));
    if (key === '-') return did(() => canvas?.zoomBy(1 / ZOOM_STEP));
    if (key === '0') return did(() => canvas?.fit());
    if (key === '1') return did(() => canvas?.oneToOne());
    if (key === '?') return did(() => page.showKeys());
    if (key === '.') return did(() => page.picture?.nextHandle());
    const letter = key.toLowerCase();
    const structure = STRUCTURE_OF_KEY.get(letter);
    if (structure && this.bench.mayMeasure())
      return this.takeUp(() => this.desk.take({ does: 'measure', structure }), page);
    if (letter === POINT_KEY && this.bench.mayAnnotate())
      return this.takeUp(() => this.desk.take({ does: 'point' }), page);
    if (letter === ROUND_KEY && this.bench.mayAnnotate())
      return this.takeUp(() => this.desk.take({ does: 'round' }), page);
    return false;
  }

  private takeUp(take: () => void, page: BenchPage): true {
    take();
    page.picture?.canvas().focus();
    return true;
  }

  /** From note to note; past the last one the focus goes on as everywhere. */
  private toNote(step: 1 | -1, { picture }: BenchPage): boolean {
    const notes = this.notes.notes();
    const now = notes.findIndex(({ id }) => id === this.notes.selected()?.id);
    const next = now < 0 ? (step > 0 ? notes[0] : undefined) : notes[now + step];
    this.notes.select(next?.id ?? null);
    const shown = picture?.edited();
    if (next && shown) picture?.reveal(shown);
    return next !== undefined;
  }
}

function did(action: () => void): true {
  action();
  return true;
}

/** Something that takes letters itself. */
function isTyping(target: EventTarget | null): boolean {
  return (
    target instanceof Element &&
    target.closest(
      'input:not([type=radio], [type=checkbox]), textarea, select, mat-select, [contenteditable], .cdk-overlay-container',
    ) !== null
  );
}

/** Something that takes Space, Enter or arrows itself. */
function isControl(target: EventTarget | null): boolean {
  return target instanceof Element && target.closest('button, a, summary, input, [role=radio], [role=tab]') !== null;
}
