import { createContext, useContext } from 'react';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import type { FormInfo } from '#shared/contracts/forms.ts';
import type { FieldError } from '#shared/errors.ts';
import type { Draft } from '../model/editor.ts';

/** What every part of the Case page shares: the draft, how to change it, and what it yields. */
export interface Editing {
  draft: Draft;
  readOnly: boolean;
  /** `field` names what is edited, so that its keystrokes become one step back. */
  edit: (field: string, change: (draft: Draft) => Draft) => void;
  editDocument: (field: string, change: (document: CaseDocument) => CaseDocument) => void;
  forms: readonly FormInfo[];
  /** The last result there was; `stale` while a newer one is on its way or its inputs are refused. */
  estimate: Estimate | undefined;
  stale: boolean;
  problems: readonly FieldError[];
  /** Rest energy of the projectile, eV, once it is known. */
  mass: number | undefined;
  /** Unit in which cross sections are shown. */
  areaUnit: string;
  setAreaUnit: (unit: string) => void;
}

export const EditingContext = createContext<Editing | null>(null);

export function useEditing(): Editing {
  const editing = useContext(EditingContext);
  if (!editing) throw new Error('This part stands inside the Case page.');
  return editing;
}
