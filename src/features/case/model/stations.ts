import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { Estimate, InteractionTerm } from '#shared/contracts/estimates.ts';
import type { FormInfo } from '#shared/contracts/forms.ts';
import { isNamedQuantities, isPoints, isQuantity } from '#shared/contracts/terms.ts';
import { formatComposed } from '#shared/units/format.ts';
import { anglesText, briefQuantity, formLabel, projectileName, termValueText } from './words.ts';

export const STATIONS = ['beam', 'target', 'interaction', 'detectors'] as const;
export type StationKey = (typeof STATIONS)[number];

/** The station whose inputs a JSON Pointer into the document belongs to. */
export function stationOf(pointer: string): StationKey {
  const [, root = '', part = ''] = pointer.split('/');
  if (root === 'runPlan') {
    if (part === 'beam') return 'beam';
    return part === 'foil' || part === 'gas' || part === 'contributions' ? 'target' : 'detectors';
  }
  if (root === 'projectile' || root === 'energy' || root === 'kinematics') return 'beam';
  if (root === 'target' || root === 'identical') return 'target';
  return root === 'interaction' || root === 'corrections' ? 'interaction' : 'detectors';
}

/** Whether a pointer belongs to the run plan, whose fields stand in a section of their own. */
export const isOfPlan = (pointer: string): boolean => pointer.startsWith('/runPlan');

/** The detectors of a plan in a few words. */
function planText(plan: NonNullable<CaseDocument['runPlan']>): string {
  const angles = plan.detectors.map(({ angle }) => angle);
  const [least, most] = [Math.min(...angles), Math.max(...angles)];
  const where = least === most ? degrees(least) : `${degrees(least)} to ${degrees(most)}`;
  const [only, ...more] = plan.detectors;
  return more.length === 0
    ? `run: ${only?.name ?? ''} at ${where}`
    : `run: ${angles.length} detectors, ${where}`;
}

const degrees = (angle: number): string => `${String(angle).replace('-', '−')}°`;

export interface StationSummary {
  main: string;
  detail: string;
}

/** A TeX symbol in plain characters: V_0 → V₀. */
export function symbolText(tex: string): string {
  return tex
    .replace(/\\(?:mathrm|text)\{([^}]*)\}/g, '$1')
    .replace(/\\alpha/g, 'α')
    .replace(/_\{?(\d+)\}?/g, (_, low: string) =>
      [...low].map((d) => '₀₁₂₃₄₅₆₇₈₉'[Number(d)] ?? d).join(''),
    )
    .replace(/[{}]/g, '');
}

function shortTerm(term: InteractionTerm, forms: readonly FormInfo[]): string {
  const form = forms.find(({ key }) => key === term.form);
  const shown = (form?.parameters ?? []).flatMap(({ key, symbol }) => {
    const value = term[key];
    const zero = isQuantity(value) && value.value === 0;
    // The units of a table stand in its rows.
    if (value === undefined || zero || key === 'lengthUnit' || key === 'energyUnit') return [];
    const text = isQuantity(value) ? briefQuantity(value) : termValueText(value);
    // A name speaks for itself, and so do parameters that carry their own.
    return [
      typeof value === 'string' || isNamedQuantities(value) || isPoints(value)
        ? text
        : `${symbolText(symbol)} ${text}`.trim(),
    ];
  });
  return shown.slice(0, 3).join(' · ');
}

/** The four stations in one line each, as they stand in the document now; the wavenumber comes from the result. */
export function summarise(
  document: CaseDocument,
  forms: readonly FormInfo[],
  estimate: Estimate | undefined,
): Record<StationKey, StationSummary> {
  const { target, interaction, angles } = document;
  const k = estimate?.kinematics.k;
  const terms = interaction.terms;
  const [first] = terms;
  return {
    beam: {
      main: `${projectileName(document.projectile)}, ${briefQuantity(document.energy)}`,
      detail: `lab${k ? ` · k = ${formatComposed(k.value, k.unit, 4)}` : ''}`,
    },
    target: {
      main:
        target.kind === 'fixed'
          ? 'fixed centre'
          : target.kind === 'nuclide'
            ? target.nuclide
            : target.kind === 'species'
              ? target.species
              : 'custom target',
      detail:
        target.kind === 'fixed'
          ? `charge ${termValueText(target.charge)}`
          : `recoils${document.identical === undefined ? '' : document.identical ? ' · identical' : ' · distinguishable'}`,
    },
    interaction: {
      main:
        terms.length === 1 && first ? formLabel(first.form, forms) : `sum of ${terms.length} terms`,
      detail:
        terms.length === 1 && first
          ? shortTerm(first, forms)
          : terms.map(({ form }) => formLabel(form, forms)).join(' + '),
    },
    detectors: {
      main: anglesText(angles),
      detail: [
        document.frame === 'lab' ? 'lab angles' : 'centre of mass',
        ...(document.runPlan ? [planText(document.runPlan)] : []),
      ].join(' · '),
    },
  };
}
