import { mkdir, rename, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { createTransport } from 'nodemailer';
import type { Mail } from '../db/mails.js';

/** Hands a message on. Handing the same one on twice must not reach anybody twice. */
export interface MailTransport {
  /** @throws when it could not be handed on; the job tries again later */
  send(mail: Mail): Promise<void>;
}

/**
 * The local transport: composes real RFC 5322 messages with nodemailer and puts them as `.eml` files into the
 * data folder, where every mail program opens them. Each message has one file, named by its id and moved into
 * place whole, so that a second try after a crash writes the same file again.
 */
export class LocalMail implements MailTransport {
  private readonly composer = createTransport({ streamTransport: true, buffer: true, newline: 'windows' });
  private readonly from: { name: string; address: string };
  private readonly host: string;

  /**
   * @param folder     `mail/` in the data folder
   * @param publicUrl  its host is the sender's
   */
  constructor(
    private readonly folder: string,
    publicUrl: string,
  ) {
    this.host = new URL(publicUrl).hostname;
    this.from = { name: 'Motebook', address: `motebook@${this.host}` };
  }

  async send(mail: Mail): Promise<void> {
    const { message } = await this.composer.sendMail({
      from: this.from,
      to: { name: '', address: mail.to },
      subject: mail.subject,
      text: mail.text,
      html: mail.html,
      date: new Date(mail.createdAt),
      messageId: `<${mail.id}@${this.host}>`,
      headers: { 'Auto-Submitted': 'auto-generated' },
    });
    await mkdir(this.folder, { recursive: true });
    const file = join(this.folder, `${mail.id}.eml`);
    await writeFile(`${file}.part`, message);
    await rename(`${file}.part`, file);
  }
}
