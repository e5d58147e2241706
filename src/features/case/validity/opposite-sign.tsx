import { useMemo, useState } from 'react';
import { Button } from '#src/components/button.tsx';
import { Notice } from '#src/components/notice.tsx';
import { classNames } from '#src/lib/class-names.ts';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import { METHODS } from '#shared/contracts/estimates.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { useEditing } from '../editing/editor-context.ts';
import { useLiveEstimate } from '../editing/use-estimate.ts';
import { curvesOf } from '../model/curves.ts';
import { computedMethods, computedOf } from './model/methods.ts';
import { oppositeOf } from './model/opposite.ts';
import { signSeries } from './model/signs.ts';
import { Panel } from './panel.tsx';
import { SignPlot } from './sign-plot.tsx';
import { SignTotals } from './sign-totals.tsx';

interface ComparisonProps {
  estimate: Estimate;
  opposite: CaseDocument;
  what: string;
  dimmed: boolean;
  fileName: string;
}

function Comparison({ estimate, opposite, what, dimmed, fileName }: ComparisonProps) {
  const { areaUnit } = useEditing();
  const asked = useMemo(() => ({ ...opposite, methods: [...METHODS] }), [opposite]);
  const { estimate: turned, stale, errors, failure } = useLiveEstimate(asked);
  const given = useMemo(() => curvesOf(estimate, areaUnit, { sums: true }), [estimate, areaUnit]);
  const other = useMemo(
    () => (turned ? curvesOf(turned, areaUnit, { sums: true }) : []),
    [turned, areaUnit],
  );
  const trouble = failure ?? errors[0]?.message ?? null;
  if (trouble !== null) {
    return (
      <Notice live tone="fault" title="The opposite sign could not be computed.">
        {trouble}
      </Notice>
    );
  }
  if (!turned) return <p className="text-muted">Computing …</p>;
  const drawn = signSeries(given, other);
  const pale = dimmed || stale;
  return (
    <div
      aria-busy={pale || undefined}
      className={classNames('flex flex-col gap-3', pale && 'stale')}
    >
      <p className="max-w-prose text-sm">Compared: {what}.</p>
      <SignTotals given={estimate} turned={turned} />
      {drawn && (
        <SignPlot
          drawn={drawn}
          curves={given}
          estimate={estimate}
          dimmed={pale}
          fileName={fileName}
        />
      )}
    </div>
  );
}

function saysOf(charged: boolean, corrected: boolean): string {
  if (!charged) {
    return '|f₁|² does not know the sign: attraction and repulsion of one strength give the same curve in first order. Beyond it they part.';
  }
  return `In first order the charge of the projectile only sets the sign of its amplitude on a charge, and |f₁|² does not know it. Beyond first order particle and antiparticle part${corrected ? '; the correction that is applied here is the beginning of it' : ''}.`;
}

interface OppositeSignProps {
  estimate: Estimate;
  dimmed: boolean;
  fileName: string;
}

/** What first order cannot see: whether the potential attracts or repels. */
export function OppositeSign({ estimate, dimmed, fileName }: OppositeSignProps) {
  const { draft } = useEditing();
  const [open, setOpen] = useState(false);
  const opposite = useMemo(() => oppositeOf(draft.document), [draft.document]);
  if (!computedOf(estimate, 'born1')) return null;
  const seen = computedMethods(estimate).length > 1;
  const partner = 'none' in opposite ? null : opposite.antiparticle;
  return (
    <Panel
      title={partner === null ? 'The sign of the potential' : `Against the ${partner}`}
      says={saysOf(partner !== null, draft.document.corrections !== undefined)}
      actions={
        !('none' in opposite) &&
        seen && (
          <Button size="small" aria-expanded={open} onClick={() => setOpen(!open)}>
            {open
              ? 'Close the comparison'
              : partner === null
                ? 'Same case, opposite sign'
                : `Same case with the ${partner}`}
          </Button>
        )
      }
    >
      {'none' in opposite ? (
        <p className="text-sm">{opposite.none}</p>
      ) : !seen ? (
        <p className="text-sm">No method beyond first order is there to see it with.</p>
      ) : (
        open && (
          <Comparison
            estimate={estimate}
            opposite={opposite.document}
            what={opposite.what}
            dimmed={dimmed}
            fileName={fileName}
          />
        )
      )}
    </Panel>
  );
}
