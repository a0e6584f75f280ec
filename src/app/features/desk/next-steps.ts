import type { FindRow } from '@shared/contracts/finds';
import type { RigView } from '@shared/contracts/rigs';

export interface NextStep {
  readonly words: string;
  readonly link: readonly string[];
}

/** More would be a list of duties rather than help. */
const MOST = 4;

/** What is worth doing now, the nearest first. */
export function nextSteps(desk: {
  readonly waiting: number;
  readonly finds: readonly FindRow[];
  readonly rigs: readonly RigView[];
}): NextStep[] {
  const { waiting, finds, rigs } = desk;
  const steps: NextStep[] = [];
  if (waiting > 0) {
    const words = waiting === 1 ? $localize`Sort 1 picture` : $localize`Sort ${waiting}:count: pictures`;
    steps.push({ words, link: ['/desk/tray'] });
  }
  for (const rig of rigs) {
    for (const setting of rig.settings.filter(({ calibration }) => calibration === null)) {
      steps.push({
        words: $localize`Calibrate ${rig.name}:rig:, ${setting.name}:setting:`,
        link: ['/desk/rigs', rig.id, 'settings', setting.id, 'calibrate'],
      });
    }
  }
  for (const find of finds.filter(({ name }) => name === null)) {
    steps.push({ words: $localize`Give ${find.number}:number: a name`, link: ['/finds', find.id] });
  }
  return steps.slice(0, MOST);
}
