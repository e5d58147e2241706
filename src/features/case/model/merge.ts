import type { FormInfo } from '#shared/contracts/forms.ts';
import { fieldsOf } from './fields.ts';
import type { Content, FieldSpec } from './fields.ts';
import { same } from '#src/lib/same.ts';

export type Side = 'mine' | 'theirs';

/** A field on which my unsaved work and the newer saved version do not agree. */
export interface Dispute {
  key: string;
  label: string;
  base: string;
  mine: string;
  theirs: string;
  /** Who changed it since the version I started from; `both` asks for a decision. */
  changedBy: Side | 'both';
}

export interface Merge {
  fields: FieldSpec[];
  disputes: Dispute[];
}

export function compareWork(
  base: Content,
  mine: Content,
  theirs: Content,
  forms: readonly FormInfo[],
): Merge {
  const fields = fieldsOf([base, mine, theirs], forms).filter(
    (field) => !same(field.value(mine), field.value(theirs)),
  );
  const disputes = fields.map((field) => ({
    key: field.key,
    label: field.label,
    base: field.text(base),
    mine: field.text(mine),
    theirs: field.text(theirs),
    changedBy: whoChanged(field, base, mine, theirs),
  }));
  return { fields, disputes };
}

function whoChanged(
  field: FieldSpec,
  base: Content,
  mine: Content,
  theirs: Content,
): Dispute['changedBy'] {
  if (same(field.value(base), field.value(mine))) return 'theirs';
  return same(field.value(base), field.value(theirs)) ? 'mine' : 'both';
}

/** My work with every field decided for the other side taken from there. */
export function mergeWork(
  mine: Content,
  theirs: Content,
  fields: readonly FieldSpec[],
  decisions: Readonly<Record<string, Side>>,
): Content {
  return fields
    .filter((field) => decisions[field.key] === 'theirs')
    .reduce((merged, field) => field.take(merged, theirs), mine);
}
