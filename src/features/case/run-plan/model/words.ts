import type { UncertainInput } from '#shared/contracts/run-plans.ts';

export const INPUT_NAMES: Record<UncertainInput, string> = {
  current: 'current',
  thickness: 'thickness',
  density: 'density',
  efficiency: 'efficiency',
  solidAngle: 'solid angle',
  background: 'background',
  energy: 'energy',
  angle: 'angle',
};
