import type { Role } from '../../shared/permission/can.js';

/** What a mail says, in text and in HTML alike. */
export interface Message {
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

export function invitation(options: { by: string; role: Role; url: string; expiresAt: string }): Message {
  const { by, role, url, expiresAt } = options;
  return letter({
    subject: 'An invitation to Motebook',
    before: [
      `${by} invites you to Motebook as ${article(role)} ${role}.`,
      'Motebook is a gallery of very small living things in which every picture carries a scale that can be trusted.',
    ],
    link: { words: 'Accept the invitation', url },
    after: [
      `The link works once, until ${inWords(expiresAt)}.`,
      'If you did not expect it, do nothing: nothing happens then.',
    ],
  });
}

export function passwordReset({ name, url, expiresAt }: { name: string; url: string; expiresAt: string }): Message {
  return letter({
    subject: 'A new password for Motebook',
    before: [`Hello ${name},`, 'somebody asked to set a new password for your account, most likely you.'],
    link: { words: 'Set a new password', url },
    after: [
      `The link works once, until ${inWords(expiresAt)}.`,
      'If it was not you, do nothing: your password stays as it is.',
    ],
  });
}

interface Letter {
  readonly subject: string;
  readonly before: readonly string[];
  readonly link: { readonly words: string; readonly url: string };
  readonly after: readonly string[];
}

/** Plain text, and HTML so simple that every mail program shows it: paragraphs and one link. */
function letter({ subject, before, link, after }: Letter): Message {
  const text = [...before, `${link.words}:\n${link.url}`, ...after, '-- \nMotebook'].join('\n\n');
  const p = (inner: string): string => `<p>${inner}</p>`;
  const body = [
    ...before.map((words) => p(escapeHtml(words))),
    p(`<a href="${escapeHtml(link.url)}">${escapeHtml(link.words)}</a>`),
    p(`<small>${escapeHtml(link.url)}</small>`),
    ...after.map((words) => p(escapeHtml(words))),
    p('Motebook'),
  ];
  const html = [
    '<!doctype html>',
    `<html lang="en"><head><meta charset="utf-8"><title>${escapeHtml(subject)}</title></head>`,
    `<body style="font-family: serif; color: #26221c; line-height: 1.5">`,
    ...body,
    '</body></html>',
  ].join('\n');
  return { subject, text: `${text}\n`, html };
}

/** `2026-03-08, 09:00 UTC`: in a form that is read alike everywhere. */
function inWords(at: string): string {
  return `${at.slice(0, 10)}, ${at.slice(11, 16)} UTC`;
}

function article(role: Role): string {
  return /^[aeiou]/.test(role) ? 'an' : 'a';
}

const ENTITIES: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

function escapeHtml(text: string): string {
  return text.replace(/[&<>"']/g, (character) => ENTITIES[character] ?? character);
}
