import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { FormInfo } from '#shared/contracts/forms.ts';
import { unitSymbol } from '#shared/units/format.ts';
import type { Difference } from '#src/components/difference-table.tsx';
import { isOriginal, isPoints } from '#shared/contracts/terms.ts';
import type { TermValue } from '#shared/contracts/terms.ts';
import { same } from '#src/lib/same.ts';
import {
  CORRECTION_NAMES,
  FRAME_NAMES,
  METHOD_NAMES,
  REGIME_NAMES,
  anglesText,
  digits,
  formLabel,
  identicalText,
  projectileText,
  quantityText,
  targetText,
  termEntries,
  termText,
  termValueText,
} from './words.ts';
import { without } from './without.ts';

/** What a version holds that a person wrote. */
export interface Content {
  title: string;
  tags: string[];
  document: CaseDocument;
}

/** One thing that can differ between two contents: how it reads, and how it is taken over. */
export interface FieldSpec {
  key: string;
  label: string;
  value: (content: Content) => unknown;
  text: (content: Content) => string;
  take: (into: Content, from: Content) => Content;
}

/** Copies one member of a document, or its absence, together with what was typed for it. */
function takeMember<K extends keyof CaseDocument>(into: Content, from: Content, key: K): Content {
  const document = { ...into.document };
  if (from.document[key] === undefined) delete document[key];
  else document[key] = from.document[key];
  return { ...into, document: takeEntered(document, from.document, `/${key}`) };
}

function takeEntered(into: CaseDocument, from: CaseDocument, pointer: string): CaseDocument {
  const at = (key: string) => key === pointer || key.startsWith(`${pointer}/`);
  const kept = Object.entries(into.entered ?? {}).filter(([key]) => !at(key));
  const taken = Object.entries(from.entered ?? {}).filter(([key]) => at(key));
  const rest = without(into, 'entered');
  const entered = Object.fromEntries([...kept, ...taken]);
  return Object.keys(entered).length === 0 ? rest : { ...rest, entered };
}

function member<K extends keyof CaseDocument>(
  key: K,
  label: string,
  text: (document: CaseDocument) => string,
): FieldSpec {
  return {
    key: `/${key}`,
    label,
    value: ({ document }) => document[key],
    text: ({ document }) => text(document),
    take: (into, from) => takeMember(into, from, key),
  };
}

function energyText(document: CaseDocument): string {
  const plain = quantityText(document.energy);
  const typed = document.entered?.['/energy'];
  if (typed === undefined || typed.replaceAll('-', '−') === plain) return plain;
  return /\b(angstrom|fm|pm|nm|bohr)\b|Å|\/u|V$/.test(typed) ? `${plain} (typed: ${typed})` : plain;
}

function goldenRuleText({ goldenRule, angles }: CaseDocument): string {
  const { theta, boxSide } = goldenRule ?? {};
  const unit = angles?.unit ?? 'deg';
  const angle =
    theta === undefined ? 'middle angle' : `${digits(theta)}${unit === 'deg' ? '°' : ` ${unit}`}`;
  return `θ = ${angle}, box ${boxSide ? quantityText(boxSide) : 'chosen by the engine'}`;
}

function unitsText({ units }: CaseDocument): string {
  const { length = 'angstrom', area = 'angstrom2', energy = 'eV' } = units ?? {};
  return [length, area, energy].map(unitSymbol).join(', ');
}

/** A plan in a line; two plans that read alike are told apart by a mark. */
function runPlanText({ runPlan }: CaseDocument): string {
  if (!runPlan) return 'none';
  const { beam, foil, gas, detectors } = runPlan;
  const rate = beam.particlesPerSecond;
  const particles = typeof rate === 'number' ? `${digits(rate)} /s` : rate && quantityText(rate);
  const target = foil?.thickness ?? foil?.arealDensity ?? gas?.pressure;
  const parts = [
    beam.current ? quantityText(beam.current) : particles,
    target && quantityText(target),
    `${detectors.length} ${detectors.length === 1 ? 'detector' : 'detectors'}`,
    `mark ${fingerprint(JSON.stringify(runPlan))}`,
  ];
  return parts.filter((part) => part !== undefined).join(', ');
}

const TITLE: FieldSpec = {
  key: 'title',
  label: 'Title',
  value: ({ title }) => title,
  text: ({ title }) => title,
  take: (into, from) => ({ ...into, title: from.title }),
};
const TAGS: FieldSpec = {
  key: 'tags',
  label: 'Tags',
  value: ({ tags }) => tags,
  text: ({ tags }) => (tags.length === 0 ? 'none' : tags.join(', ')),
  take: (into, from) => ({ ...into, tags: from.tags }),
};
const BEAM: FieldSpec[] = [
  member('projectile', 'Particle', ({ projectile }) => projectileText(projectile)),
  member('energy', 'Energy', energyText),
  member('kinematics', 'Kinematics', (d) => REGIME_NAMES[d.kinematics ?? 'nonrelativistic']),
  member('target', 'Target', ({ target }) => targetText(target)),
  member('identical', 'Identical particles', ({ identical }) => identicalText(identical)),
  member('corrections', 'Corrections', ({ corrections = [] }) =>
    corrections.length === 0 ? 'none' : corrections.map((one) => CORRECTION_NAMES[one]).join(', '),
  ),
];
const TABLE: FieldSpec[] = [
  member('methods', 'Methods', ({ methods }) => methods.map((m) => METHOD_NAMES[m]).join(', ')),
  member('angles', 'Angles', ({ angles }) => anglesText(angles)),
  member('frame', 'Frame', ({ frame }) => FRAME_NAMES[frame ?? 'cm']),
  member('goldenRule', 'Golden rule', goldenRuleText),
  member('units', 'Units of the answer', unitsText),
  member('runPlan', 'Run plan', runPlanText),
];

function takeParameter(into: Content, from: Content, index: number, key: string): Content {
  const terms = into.document.interaction.terms.map((term, place) => {
    if (place !== index) return term;
    const value = from.document.interaction.terms[index]?.[key];
    return value === undefined
      ? { ...without(term, key), form: term.form }
      : { ...term, [key]: value };
  });
  const document = { ...into.document, interaction: { terms } };
  const pointer = `/interaction/terms/${index}/${key}`;
  return { ...into, document: takeEntered(document, from.document, pointer) };
}

/** Rows and originals read alike when they are as many: a mark tells those apart that differ. */
function distinctText(value: TermValue | undefined): string {
  const text = termValueText(value);
  if (!isPoints(value) && !isOriginal(value)) return text;
  return `${text}, mark ${fingerprint(isPoints(value) ? value.flat().join(' ') : value.text)}`;
}

/** Six letters and figures that another text hardly has too (FNV-1a). */
function fingerprint(text: string): string {
  let hash = 0x811c9dc5;
  for (let i = 0; i < text.length; i++) {
    hash = Math.imul(hash ^ text.charCodeAt(i), 0x01000193) >>> 0;
  }
  return hash.toString(36).padStart(6, '0').slice(-6);
}

function parameterSpec(
  index: number,
  parameter: { key: string; label: string },
  prefix: string,
): FieldSpec {
  const read = ({ document }: Content) => document.interaction.terms[index]?.[parameter.key];
  return {
    key: `/interaction/terms/${index}/${parameter.key}`,
    label: `${prefix}${parameter.label}`,
    value: read,
    text: (content) => distinctText(read(content)),
    take: (into, from) => takeParameter(into, from, index, parameter.key),
  };
}

function interactionSpecs(contents: readonly Content[], forms: readonly FormInfo[]): FieldSpec[] {
  const shape = ({ document }: Content) => document.interaction.terms.map(({ form }) => form);
  const [first] = contents;
  // Where the forms differ a parameter of one has no counterpart in the other: the interaction is then one field.
  if (!first || !contents.every((content) => same(shape(content), shape(first)))) {
    return [
      member('interaction', 'Interaction', ({ interaction }) =>
        interaction.terms.map((term) => termText(term, forms)).join(' + '),
      ),
    ];
  }
  return first.document.interaction.terms.flatMap((term, index) => {
    const prefix = shape(first).length > 1 ? `Term ${index + 1}, ` : '';
    const seen = new Map<string, { key: string; label: string }>();
    for (const { document } of contents) {
      const other = document.interaction.terms[index] ?? term;
      for (const { key, label } of termEntries(other, forms)) seen.set(key, { key, label });
    }
    const name = formLabel(term.form, forms);
    return [...seen.values()].map((parameter) =>
      parameterSpec(index, { ...parameter, label: `${name}: ${parameter.label}` }, prefix),
    );
  });
}

/** After the terms, for taking one of those leaves the citation out. */
const CITATION: FieldSpec = {
  key: '/interaction/citation',
  label: 'From the library',
  value: ({ document }) => document.interaction.citation,
  text: ({ document: { interaction } }) => {
    const { citation } = interaction;
    return citation
      ? `version ${citation.version} of interaction ${citation.id.slice(0, 8)}`
      : 'no citation';
  },
  take: (into, from) => {
    const { terms } = into.document.interaction;
    const { citation } = from.document.interaction;
    const interaction = citation ? { terms, citation } : { terms };
    return { ...into, document: { ...into.document, interaction } };
  },
};

/** Every field of these contents, in the order of the beam line. */
export function fieldsOf(contents: readonly Content[], forms: readonly FormInfo[]): FieldSpec[] {
  return [TITLE, TAGS, ...BEAM, ...interactionSpecs(contents, forms), CITATION, ...TABLE];
}

/** Field by field, in words and units, what turns `before` into `after`. */
export function differences(
  before: Content,
  after: Content,
  forms: readonly FormInfo[],
): Difference[] {
  return fieldsOf([before, after], forms)
    .filter((field) => !same(field.value(before), field.value(after)))
    .map((field) => ({
      key: field.key,
      label: field.label,
      before: field.text(before),
      after: field.text(after),
    }))
    .filter((difference) => difference.before !== difference.after);
}
