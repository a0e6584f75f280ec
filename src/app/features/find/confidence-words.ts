import type { CONFIDENCES } from '@shared/contracts/finds';

const WORDS: Readonly<Record<(typeof CONFIDENCES)[number], string>> = {
  certain: $localize`certain`,
  'fairly sure': $localize`fairly sure`,
  'a guess': $localize`a guess`,
};

export function confidenceWords(confidence: (typeof CONFIDENCES)[number]): string {
  return WORDS[confidence];
}
