import type { Estimate, GoldenRule } from '#shared/contracts/estimates.ts';
import { fullDigits } from '#shared/units/format.ts';
import { chainOf } from '../../model/chain.ts';

/** The golden-rule sheet as rows: names, then each line of the chain and what stands after it, with all digits, unit and law. */
export function chainRows(rule: GoldenRule, estimate: Estimate): string[][] {
  const chain = chainOf(rule, estimate).map(({ name, law, value }) => {
    const parts =
      'value' in value
        ? [fullDigits(value.value), '']
        : [fullDigits(value.re), value.im === 0 ? '' : fullDigits(value.im)];
    return [name, ...parts, value.unit, law];
  });
  const after = rule.factorsAfter.map(({ name, dcs }) => [
    `Differential cross section with ${name}`,
    fullDigits(dcs.value),
    '',
    dcs.unit,
    '',
  ]);
  const window =
    'none' in rule.window
      ? []
      : [
          ['Shortest time', fullDigits(rule.window.t0Min.value), '', rule.window.t0Min.unit, ''],
          ['Longest time', fullDigits(rule.window.t0Max.value), '', rule.window.t0Max.unit, ''],
        ];
  return [
    ['quantity', 'value', 'imaginary part', 'unit', 'law (TeX)'],
    ['Angle, centre of mass', fullDigits(rule.theta), '', estimate.units.angle, ''],
    ['Side of the box', fullDigits(rule.boxSide.value), '', rule.boxSide.unit, ''],
    ...chain,
    ...after,
    ...window,
  ];
}
