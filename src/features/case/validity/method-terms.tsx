import { Chip } from '#src/components/chip.tsx';
import { formatNumber, unitSymbol } from '#shared/units/format.ts';
import type { Condition, Estimate } from '#shared/contracts/estimates.ts';
import { brief } from '../model/verdict.ts';
import { METHOD_NAMES } from '../model/words.ts';
import { computedMethods, refusedMethods } from './model/methods.ts';
import type { ComputedMethod } from './model/methods.ts';
import { Panel } from './panel.tsx';

/** What the engine calls the conditions, as people call them, with the unit of those that have one. */
const NAMES: Readonly<Record<string, { name: string; unit?: string }>> = {
  secondOrderSize: { name: 'second-order size' },
  opticalTheorem: { name: 'optical theorem, second order' },
  shortWaves: { name: 'short waves, kR' },
  fastParticles: { name: 'fast particles' },
  smallAngles: { name: 'small angles, up to', unit: 'rad' },
  momentumTransfer: { name: 'largest momentum transfer', unit: '1/angstrom' },
  eta: { name: 'Sommerfeld parameter' },
  kR: { name: 'kR' },
  lMax: { name: 'highest wave solved, l' },
  waves: { name: 'radial equations solved' },
};

/** A count as it is, anything else to three digits. */
function numberText(value: number): string {
  const plain = Number.isInteger(value) && Math.abs(value) < 1e6;
  return plain ? String(value) : formatNumber(value, 3);
}

function limitText(value: number): string {
  const size = Math.abs(value);
  return size >= 1e-3 && size < 1e6 ? String(Number(value.toPrecision(3))) : formatNumber(value, 1);
}

/** A residual that is a rounding needs one digit, one that says something has three. */
function residualText(value: number): string {
  return value < 1e-3 ? brief(value) : formatNumber(value, 3);
}

function bound({ most, least }: Condition, unit: string): string {
  if (most !== undefined) return `should stay below ${limitText(most)}${unit}`;
  return least === undefined ? 'reported only' : `should stay above ${limitText(least)}${unit}`;
}

function ConditionRow({ condition }: { condition: Condition }) {
  const { name, value, holds, meaning, most, least } = condition;
  const judged = most !== undefined || least !== undefined;
  const known = NAMES[name];
  const unit = known?.unit === undefined ? '' : `\u00a0${unitSymbol(known.unit)}`;
  return (
    <li className="flex flex-wrap items-start justify-between gap-x-5 gap-y-1 py-1">
      <div className="min-w-0 flex-1 basis-56">
        {known?.name ?? name}{' '}
        <span className="font-mono">
          {numberText(value)}
          {unit}
        </span>
        <span className="block text-xs text-muted">{meaning}</span>
      </div>
      <span className="flex flex-wrap items-center gap-x-3 text-xs text-muted">
        {bound(condition, unit)}
        {judged && (
          <Chip
            tone={holds ? 'sound' : 'fault'}
            icon={<span aria-hidden="true">{holds ? '●' : '○'}</span>}
          >
            {holds ? 'holds' : 'does not hold'}
          </Chip>
        )}
      </span>
    </li>
  );
}

const FIRST_ORDER = 'Its conditions are the criteria of the verdict above.';

function MethodTerms({ method, result }: ComputedMethod) {
  const { conditions = [], opticalTheorem } = result;
  return (
    <li className="border-t border-line py-2 first:border-t-0">
      <h3 className="font-semibold">{METHOD_NAMES[method]}</h3>
      {method === 'born1' && <p className="text-sm text-muted">{FIRST_ORDER}</p>}
      {conditions.length > 0 && (
        <ul>
          {conditions.map((condition) => (
            <ConditionRow key={condition.name} condition={condition} />
          ))}
        </ul>
      )}
      {method !== 'born1' && conditions.length === 0 && !opticalTheorem && (
        <p className="text-sm text-muted">It states no condition for this case.</p>
      )}
      {opticalTheorem && (
        <p className="py-1">
          optical theorem <span className="font-mono">{residualText(opticalTheorem.residual)}</span>
          <span className="block text-xs text-muted">
            (4π/k) Im f(0) less elastic, integrated over angle, and absorption: relative to the
            total
          </span>
        </p>
      )}
    </li>
  );
}

/** What each method asks of a case, with the numbers of this one; and why a method is missing. */
export function MethodConditions({ estimate }: { estimate: Estimate }) {
  const refused = refusedMethods(estimate);
  return (
    <Panel title="Conditions of the methods">
      <ul>
        {computedMethods(estimate).map((computed) => (
          <MethodTerms key={computed.method} {...computed} />
        ))}
        {refused.map(({ method, reason }) => (
          <li key={method} className="border-t border-line py-2 first:border-t-0">
            <h3 className="flex flex-wrap items-center gap-2 font-semibold">
              {METHOD_NAMES[method]} <Chip tone="plain">not available here</Chip>
            </h3>
            <p className="text-sm">{reason}</p>
          </li>
        ))}
      </ul>
    </Panel>
  );
}
