import type { Role } from '@shared/permission/can';

const WORDS: Readonly<Record<Role, string>> = {
  photographer: $localize`photographer: brings pictures in and measures`,
  identifier: $localize`identifier: compares, and gives names with reasons`,
  editor: $localize`editor: chooses and publishes`,
  keeper: $localize`keeper: invites people and sees that nothing is lost`,
};

/** A role and what it is for. */
export function roleWords(role: Role): string {
  return WORDS[role];
}
