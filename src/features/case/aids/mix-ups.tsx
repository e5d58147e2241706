import { useState } from 'react';
import { useQueries } from '@tanstack/react-query';
import { Field, TextInput } from '#src/components/field.tsx';
import { Notice } from '#src/components/notice.tsx';
import { Segmented } from '#src/components/segmented.tsx';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { slipsOfCase } from '#shared/mix-up-factors.ts';
import { computedSlip, judgeMixUp, usualSlips } from '#shared/mix-ups.ts';
import type { ComparedKind, Judgement } from '#shared/mix-ups.ts';
import { formatComposed, formatNumber, fullDigits } from '#shared/units/format.ts';
import { fromInternal, toInternal } from '#shared/units/quantity.ts';
import { UNITS } from '#shared/units/vocabulary.ts';
import { useEditing } from '../editing/editor-context.ts';
import { useSettled } from '../editing/use-estimate.ts';
import { angleWithUnit } from './model/angle-words.ts';
import { alternativesOf, atAngle, readValue } from './model/alternatives.ts';
import { factsOf } from './model/case-facts.ts';
import { angleValues, anglesOf } from '../model/table.ts';
import { FRAME_NAMES } from '../model/words.ts';
import { readEnd } from './model/angle-range.ts';
import { TypedQuantityField, emptyIn } from './typed-quantity.tsx';
import { aidsQuery } from './use-aids.ts';

function percent(deviation: number): string {
  return `${formatNumber(100 * deviation, 2)} %`;
}

function Verdict({ judged }: { judged: Judgement }) {
  const times = `${formatNumber(judged.ratio, 4)} times ours`;
  if (judged.verdict === 'agree') {
    return (
      <Notice tone="sound" title="The two values agree.">
        They differ by {percent(judged.deviation)}.
      </Notice>
    );
  }
  if (judged.verdict === 'explained') {
    return (
      <Notice tone="attention" title={`The other value is ${times}. It looks as if it`}>
        <ul className="list-disc pl-5">
          {judged.by.map(({ key, words, factor }) => (
            <li key={key}>
              {words} <span className="text-muted">(× {formatNumber(factor, 5)})</span>
            </li>
          ))}
        </ul>
      </Notice>
    );
  }
  const { nearest } = judged;
  return (
    <Notice
      tone="info"
      title={`The other value is ${times}, and none of the usual slips gives that.`}
    >
      {nearest
        ? `The nearest would be that it ${nearest.words} (× ${formatNumber(nearest.factor, 4)}), which misses by ${percent(nearest.deviation)}. `
        : ''}
      Compare what both were made for: potential, energy, frame, target and units.
    </Notice>
  );
}

interface Question {
  kind: ComparedKind;
  theta: number;
  estimate: Estimate;
}

/** Our value for what is compared, and what it would be with each slip of the inputs; angstrom². */
function useValues({ kind, theta, estimate }: Question, enabled: boolean) {
  const { draft } = useEditing();
  const document = useSettled(draft.document, 200);
  const alternatives = alternativesOf({ document, estimate, kind, theta });
  const results = useQueries({
    queries: [
      { ...aidsQuery(atAngle(document, theta, estimate.units.angle)), enabled },
      ...alternatives.map(({ body }) => ({ ...aidsQuery(body), enabled, retry: false })),
    ],
  });
  const [own, ...others] = results;
  const fresh = (query: (typeof results)[number] | undefined) =>
    query?.data && !query.isPlaceholderData ? query.data : null;
  const ownAnswer = fresh(own);
  return {
    settled: results.every((query) => !query.isFetching),
    ours: ownAnswer && readValue(ownAnswer, kind),
    slips: alternatives.map(({ key, words, read }, i) => {
      const answer = fresh(others[i]);
      return { key, words, value: answer ? readValue(answer, read) : null };
    }),
  };
}

/** Another source's value beside ours: which of the usual slips would make one of the other. */
export function MixUps({ estimate }: { estimate: Estimate }) {
  const { draft, areaUnit } = useEditing();
  const { unit } = anglesOf(draft.document);
  const angles = angleValues(anglesOf(draft.document));
  const [kind, setKind] = useState<ComparedKind>('dcs');
  const [typedAngle, setTypedAngle] = useState<string | null>(null);
  const [typed, setTyped] = useState(() => emptyIn(areaUnit));
  const first = angles[Math.floor((angles.length - 1) / 3)] ?? 0;
  const angleText = typedAngle ?? fullDigits(first);
  const angle = readEnd(angleText, 'The angle', unit);
  const theta = 'value' in angle ? angle.value : first;
  const asked = typed.value !== null && 'value' in angle;
  const { ours, slips, settled } = useValues({ kind, theta, estimate }, asked);
  const theirs = typed.value;
  const positive = theirs !== null && theirs.value > 0;
  const judged =
    asked && positive && ours && ours > 0
      ? judgeMixUp(toInternal(theirs, 'area'), ours, [
          ...usualSlips(
            kind,
            theirs.unit,
            kind === 'dcs' ? theta * (UNITS.angle[unit] ?? 1) : null,
          ),
          ...slipsOfCase(factsOf(draft.document, estimate)),
          ...slips.flatMap(({ key, words, value }) => {
            const slip = value === null ? null : computedSlip(key, words, value, ours);
            return slip ? [slip] : [];
          }),
        ])
      : null;
  const per = kind === 'dcs' ? '/sr' : '';
  return (
    <div className="grid gap-x-6 gap-y-4 @2xl:grid-cols-[17rem_minmax(0,1fr)]">
      <div className="flex flex-col gap-2.5">
        <Segmented
          label="What is compared"
          value={kind}
          choices={[
            { value: 'dcs', label: 'dσ/dΩ at an angle' },
            { value: 'total', label: 'elastic total' },
          ]}
          onChange={setKind}
        />
        {kind === 'dcs' && (
          <Field
            label={`Angle (${unit === 'deg' ? '°' : unit}), ${FRAME_NAMES[estimate.frame]}`}
            error={'problem' in angle ? angle.problem : undefined}
          >
            {(control) => (
              <TextInput
                {...control}
                inputMode="decimal"
                autoComplete="off"
                className="font-mono"
                value={angleText}
                onChange={(event) => setTypedAngle(event.target.value)}
              />
            )}
          </Field>
        )}
        <TypedQuantityField
          label={kind === 'dcs' ? 'The other value, per steradian' : 'The other value'}
          name="the other value"
          dimension="area"
          perSteradian={kind === 'dcs'}
          typed={typed}
          onTyped={setTyped}
          error={theirs !== null && !positive ? 'A cross section is above zero.' : undefined}
          hint={`As it is printed, in the unit it is printed in${kind === 'dcs' ? ' (per steradian)' : ''}.`}
        />
      </div>
      <div
        aria-live="polite"
        aria-busy={(asked && !settled) || undefined}
        className="flex flex-col gap-2"
      >
        {!asked && (
          <p className="text-sm text-muted">
            Enter the value of a paper, a table or another program. The ratio is compared with the
            slips that are commonly made with units, solid angle, frame, energy and angle.
          </p>
        )}
        {asked && ours !== null && (
          <p className="text-sm">
            Ours{kind === 'dcs' ? ` at ${angleWithUnit(theta, unit)}` : ''}:{' '}
            <span className="font-mono">
              {formatComposed(
                fromInternal(ours, typed.unit, 'area').value,
                `${typed.unit}${per}`,
                5,
              )}
            </span>
          </p>
        )}
        {asked && ours === null && settled && (
          <p className="text-sm">
            This case has no such value to compare with
            {kind === 'total' ? ': its total diverges' : ' at this angle'}.
          </p>
        )}
        {judged && settled && <Verdict judged={judged} />}
      </div>
    </div>
  );
}
