import type { SetScale } from '../shared/contracts/scales.js';
import { UNCERTIFICATED_TOLERANCE_UM } from '../shared/scale/calibration.js';
import { Hand } from './demo-bodies.js';
import type { DemoTeller } from './demo-teller.js';
import { Random } from './pictures/random.js';

/** The rigs of the bench: the oil objective is calibrated, the dry one not yet. */
export async function calibrateBench(teller: DemoTeller, spores: string, micrometer: string): Promise<void> {
  const { rooms, people } = teller;
  const rig = await rooms.rigs.add(people.photographer, {
    ...{ name: 'Bench microscope', camera: 'monochrome and colour sensor, 1392 × 1040' },
    remarks: 'Camera on the straight tube, adapter 1×.',
  });
  const oil = await rooms.rigs.addSetting(rig.id, {
    ...{ name: '100× oil', objective: '100×/1.25 oil', magnification: 100, numericalAperture: 1.25 },
    ...{ oneSitting: false, captureMode: 'full frame' },
  });
  await rooms.rigs.addSetting(rig.id, {
    ...{ name: '40×', objective: '40×/0.65', magnification: 40, numericalAperture: 0.65 },
    ...{ oneSitting: false, captureMode: 'full frame' },
  });
  const phone = await rooms.rigs.add(people.photographer, {
    ...{ name: 'Telephone', camera: 'telephone' },
    remarks: 'For the towpath; no two mountings are alike.',
  });
  await rooms.rigs.addSetting(phone.id, {
    ...{ name: 'Clip-on lens', objective: 'clip-on, about 15×', magnification: null, numericalAperture: null },
    ...{ oneSitting: true, captureMode: 'main camera, no zoom' },
  });
  const spacingUm = 10;
  await rooms.rigs.calibrate(people.photographer, rig.id, oil.id, {
    ...{ imageId: micrometer, spacingUm, toleranceUm: UNCERTIFICATED_TOLERANCE_UM },
    marks: new Hand(new Random(42)).graduations(teller.truth('stage-micrometer.jpg'), spacingUm),
  });
  await rooms.scales.set(people.photographer, spores, { by: 'setting', settingId: oil.id });
}

/**
 * A scale by calculation that comes out as the picture was rendered: the pitch follows from it, to a
 * ten-thousandth of a micrometre.
 */
export function optics(umPerPx: number, magnification: number, relay: number): SetScale {
  const pixelPitchUm = Number((umPerPx * magnification * relay).toFixed(4));
  return { by: 'optics', pixelPitchUm, magnification, relay, binning: 1 };
}
