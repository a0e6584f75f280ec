import { DOCUMENT, inject, Injectable } from '@angular/core';
import type { NoteEdit } from '@shared/annotations/note';

/**
 * Edits that the server has not acknowledged yet, kept over a reload or a closed lid. One key per edit, so
 * that two tabs of one person add to each other instead of overwriting; their ids sort by time.
 */
@Injectable({ providedIn: 'root' })
export class UnsentEdits {
  private readonly storage = openStorage(inject(DOCUMENT));

  /** Of one person on one picture, oldest first. */
  of(personId: string, imageId: string): NoteEdit[] {
    return this.keys()
      .filter((key) => key.startsWith(`${PREFIX}${personId}/${imageId}/`))
      .sort()
      .flatMap((key) => this.read(key) ?? []);
  }

  /** Pictures of this person on which something waits. */
  pictures(personId: string): string[] {
    const own = `${PREFIX}${personId}/`;
    const waiting = this.keys().filter((key) => key.startsWith(own));
    return [...new Set(waiting.map((key) => key.slice(own.length).split('/')[0] ?? ''))];
  }

  /** @returns false where storage is closed or full: then the edit lives in this page alone */
  keep(personId: string, imageId: string, edit: NoteEdit): boolean {
    try {
      this.storage?.setItem(keyOf(personId, imageId, edit.id), JSON.stringify(edit));
      return this.storage !== null;
    } catch {
      return false; // a full quota; the leave warning still stands
    }
  }

  forget(personId: string, imageId: string, editId: string): void {
    this.storage?.removeItem(keyOf(personId, imageId, editId));
  }

  private keys(): string[] {
    const { storage } = this;
    if (!storage) return [];
    return Array.from({ length: storage.length }, (_, i) => storage.key(i) ?? '').filter((key) =>
      key.startsWith(PREFIX),
    );
  }

  private read(key: string): NoteEdit | null {
    try {
      return JSON.parse(this.storage?.getItem(key) ?? 'null') as NoteEdit | null;
    } catch {
      return null; // not ours, or cut off by a crash
    }
  }
}

const PREFIX = 'unsent-note/';
const keyOf = (personId: string, imageId: string, editId: string) => `${PREFIX}${personId}/${imageId}/${editId}`;

function openStorage(document: Document): Storage | null {
  try {
    return document.defaultView?.localStorage ?? null;
  } catch {
    return null; // closed to us by the browser's settings
  }
}
