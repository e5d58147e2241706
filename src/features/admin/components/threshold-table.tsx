import type { Settings } from '#shared/contracts/settings.ts';
import { fullDigits } from '#shared/units/format.ts';
import { THRESHOLDS, placeOf } from '../model/thresholds.ts';

/** The thresholds in force, for those who do not set them. */
export function ThresholdTable({ settings }: { settings: Settings }) {
  return (
    <dl className="grid max-w-md grid-cols-[1fr_auto] gap-x-6 gap-y-1.5 rounded border border-line bg-sheet px-4 py-3">
      {THRESHOLDS.map((one) => (
        <div key={placeOf(one)} className="contents">
          <dt>{one.label}</dt>
          <dd className="font-mono">{fullDigits(settings.verdict[one.basis][one.limit])}</dd>
        </div>
      ))}
    </dl>
  );
}
