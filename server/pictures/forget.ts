import type { ImageTable } from '../db/images.js';
import type { Job } from '../db/jobs.js';
import type { Originals } from './originals.js';
import type { PictureFiles } from './picture-files.js';

/**
 * Removes the files of a picture that was discarded; its original only when no other picture has it. A job,
 * enqueued with the discarding, so that a cut in between leaves nothing behind.
 */
export function forgetFiles(
  images: ImageTable,
  files: PictureFiles,
  originals: Originals,
): (job: Job) => Promise<void> {
  return async ({ about: id, payload }) => {
    const { sha256 } = payload as { sha256: string };
    await files.forgetMade(id);
    await originals.inTurn(sha256, async () => {
      if (!(await images.hasOriginal(sha256))) await files.forgetOriginal(sha256);
    });
  };
}
