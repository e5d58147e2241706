import { AreaUnitMenu, Figure } from '#src/components/figure.tsx';
import { composedFactor } from '#shared/units/composed.ts';
import { fullDigits } from '#shared/units/format.ts';
import type { Estimate, Integral } from '#shared/contracts/estimates.ts';
import { TakeRows } from '../aids/take-rows.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { numericsText } from '../model/verdict.ts';
import { METHOD_NAMES } from '../model/words.ts';
import { offBy, signedPercent } from './model/deviations.ts';
import { computedMethods, referenceName, referenceOf } from './model/methods.ts';
import type { ComputedMethod } from './model/methods.ts';
import { Panel } from './panel.tsx';

const KINDS = ['elastic', 'absorption', 'total', 'momentumTransfer', 'viscosity'] as const;
type Kind = (typeof KINDS)[number];

const NAMES: Record<Kind, string> = {
  elastic: 'Elastic',
  absorption: 'Absorption',
  total: 'Total',
  momentumTransfer: 'Momentum transfer',
  viscosity: 'Viscosity',
};

function inUnit(integral: Integral, unit: string) {
  if ('divergent' in integral) return null;
  const factor = composedFactor(integral.unit, unit);
  return {
    value: integral.value * factor,
    relativeError: integral.relativeError,
    absoluteError:
      integral.absoluteError === undefined ? undefined : integral.absoluteError * factor,
  };
}

interface CellProps {
  kind: Kind;
  computed: ComputedMethod;
  reference: ComputedMethod;
  unit: string;
}

function Cell({ kind, computed, reference, unit }: CellProps) {
  const integral = computed.result[kind];
  const found = inUnit(integral, unit);
  const off = computed.method === reference.method ? null : offBy(integral, reference.result[kind]);
  if (!found) return <td className="px-3 py-1.5 align-top font-semibold">divergent</td>;
  return (
    <td className="px-3 py-1.5 align-top whitespace-nowrap">
      <Figure
        label={`${NAMES[kind]} σ, ${METHOD_NAMES[computed.method]}`}
        value={found.value}
        unit={unit}
        digits={5}
      />
      <span className="block text-xs text-muted">{numericsText(found)}</span>
      {off !== null && (
        <span className="block text-xs text-muted">
          {signedPercent(off)} to {referenceName(reference.method)}
        </span>
      )}
    </td>
  );
}

/** Why integrals diverge, each reason once with the integrals it is that of. */
function divergences(methods: readonly ComputedMethod[]): { reason: string; kinds: string[] }[] {
  const kindsOf = new Map<string, Set<string>>();
  for (const { result } of methods) {
    for (const kind of KINDS) {
      const integral = result[kind];
      if (!('divergent' in integral)) continue;
      const kinds = kindsOf.get(integral.reason) ?? new Set();
      kindsOf.set(integral.reason, kinds.add(NAMES[kind].toLowerCase()));
    }
  }
  return [...kindsOf].map(([reason, kinds]) => ({ reason, kinds: [...kinds] }));
}

/** Names, units, then one row an integral: value and bound of its error of every method. */
function integralRows(methods: readonly ComputedMethod[], unit: string): string[][] {
  const names = methods.map(({ method }) => METHOD_NAMES[method]);
  return [
    ['cross section', ...names.flatMap((name) => [name, `error of ${name}`])],
    ['', ...methods.flatMap(() => [unit, unit])],
    ...KINDS.map((kind) => [
      NAMES[kind].toLowerCase(),
      ...methods.flatMap(({ result }) => {
        const found = inUnit(result[kind], unit);
        if (!found) return ['divergent', ''];
        const { value, relativeError, absoluteError } = found;
        const error = absoluteError ?? (relativeError ?? 0) * Math.abs(value);
        return [fullDigits(value), fullDigits(error)];
      }),
    ]),
  ];
}

interface IntegralsTableProps {
  estimate: Estimate;
  fileName: string;
}

/** Integrals of every method side by side. */
export function IntegralsTable({ estimate, fileName }: IntegralsTableProps) {
  const { areaUnit, setAreaUnit } = useEditing();
  const methods = computedMethods(estimate);
  const reference = referenceOf(estimate);
  if (!reference) return null;
  return (
    <Panel
      title="Integrated cross sections"
      says="Weights use the angle of the centre of mass; a total is the same in every frame."
      actions={
        <div className="flex flex-wrap items-center gap-3">
          <span className="inline-flex items-center gap-1.5 text-sm" data-screen-only>
            shown in
            <AreaUnitMenu unit={areaUnit} onChange={setAreaUnit} label="Unit of the integrals" />
          </span>
          <TakeRows
            fileName={`${fileName}-integrals`}
            rows={() => integralRows(methods, areaUnit)}
          />
        </div>
      }
    >
      <div
        className="relative -mb-8 overflow-x-auto pb-9"
        tabIndex={0}
        role="region"
        aria-label="Table of integrated cross sections"
      >
        <table className="w-full text-left">
          <caption className="sr-only">Integrated cross sections of every method</caption>
          <thead>
            <tr className="text-sm text-muted">
              <th scope="col" className="sticky left-0 bg-sheet px-3 py-1.5 pl-0 font-normal">
                σ
              </th>
              {methods.map(({ method }) => (
                <th key={method} scope="col" className="px-3 py-1.5 font-normal whitespace-nowrap">
                  {METHOD_NAMES[method]}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {KINDS.map((kind) => (
              <tr key={kind} className="border-t border-line">
                <th
                  scope="row"
                  className="sticky left-0 bg-sheet px-3 py-1.5 pl-0 align-top font-normal"
                >
                  {NAMES[kind]}
                </th>
                {methods.map((computed) => (
                  <Cell
                    key={computed.method}
                    kind={kind}
                    computed={computed}
                    reference={reference}
                    unit={areaUnit}
                  />
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      {divergences(methods).map(({ reason, kinds }) => (
        <p key={reason} className="mt-1 max-w-prose text-sm text-muted">
          <span className="font-semibold text-ink">Divergent, {kinds.join(' and ')}:</span> {reason}
        </p>
      ))}
    </Panel>
  );
}
