/**
 * Places at which a test lets the power fail: the whole process ends at once, as by a cut, when the
 * environment's FAIL_POINT names the place. Nothing happens otherwise.
 */
export const FAIL_POINTS = [
  'upload:received',
  'upload:moved',
  'upload:recorded',
  'upload:cleared',
  'intake:begun',
  'intake:made',
  'intake:renamed',
  'intake:recorded',
] as const;
export type FailPoint = (typeof FAIL_POINTS)[number];

export function failPoint(name: FailPoint): void {
  if (process.env['FAIL_POINT'] === name) process.kill(process.pid, 'SIGKILL');
}
