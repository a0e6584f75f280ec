/**
 * A process of its own in which what strangers send is decoded. It is given one task, answers once and ends;
 * `child-process.ts` starts it and holds it to its limits of memory and time.
 */
import sharp, { type SharpOptions } from 'sharp';
import type { ChildAnswer, ChildTask, IntakeFacts } from './child-tasks.js';
import { readCaptureNotes } from './capture-notes.js';
import { lookAtHeader } from './look-at-header.js';
import { makeAccessCopy, makeRenditions, placeholderColours } from './make-renditions.js';
import { Refused } from './refusal.js';

sharp.cache(false);

/** @throws {Refused} */
async function takeIn(task: Extract<ChildTask, { task: 'intake' }>): Promise<IntakeFacts> {
  const header = await lookAtHeader(task.source, task.maxPixels);
  const options: SharpOptions = { limitInputPixels: task.maxPixels, failOn: 'error' };
  const { upright: size, bitDepth } = header;
  await decoding(() => makeAccessCopy({ source: task.source, folder: task.folder, size, bitDepth, options }));
  const widths = await makeRenditions(task.folder, header.upright);
  const notesFrom = header.type === 'tiff' ? task.source : header.exif;
  const notes = notesFrom === null ? null : await readCaptureNotes(notesFrom, header.stored);
  return {
    format: header.type,
    ...header.upright,
    bitDepth: header.bitDepth,
    renditionWidths: widths,
    colours: await placeholderColours(task.folder),
    notes,
  };
}

/** A square portrait without any of the file's own notes. @throws {Refused} */
async function portray(task: Extract<ChildTask, { task: 'portrait' }>): Promise<void> {
  await lookAtHeader(task.source, task.maxPixels);
  await decoding(() =>
    sharp(task.source, { limitInputPixels: task.maxPixels, failOn: 'error' })
      .autoOrient()
      .resize({ width: task.sidePx, height: task.sidePx, fit: 'cover' })
      .flatten({ background: '#ffffff' })
      .toColourspace('srgb')
      .webp({ quality: 85 })
      .toFile(task.target),
  );
}

/** Whatever the decoder says of the pixels, it means that they can't be read. */
async function decoding(work: () => Promise<unknown>): Promise<void> {
  try {
    await work();
  } catch (error) {
    if (isDiskFull(error)) throw error; // not the picture's fault: tried again later
    throw new Refused('not-readable', { detail: String(error).slice(0, 200) });
  }
}

function isDiskFull(error: unknown): boolean {
  return /no space|ENOSPC|unable to write|disc full/i.test(String(error));
}

async function answer(task: ChildTask): Promise<ChildAnswer> {
  try {
    if (task.task === 'intake') return { done: 'intake', facts: await takeIn(task) };
    await portray(task);
    return { done: 'portrait' };
  } catch (error) {
    if (error instanceof Refused)
      return { done: 'refused', refusal: { code: error.code, parameters: error.parameters } };
    throw error;
  }
}

process.once('message', (task: ChildTask) => {
  answer(task).then(
    (result) => {
      process.send?.(result, () => process.disconnect());
    },
    (error: unknown) => {
      process.stderr.write(`${String(error)}\n`);
      process.exit(1);
    },
  );
});

// whoever gave the task is gone: nobody wants the answer
process.once('disconnect', () => process.exit());
