import { v7 } from 'uuid';

/** A new id: UUIDv7 as text, so that ids sort by when they were made. */
export function newId(): string {
  return v7();
}
