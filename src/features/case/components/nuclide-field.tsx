import type { ReactNode } from 'react';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { Reading } from '../model/typing.ts';
import { NameField } from './name-field.tsx';

/** `C-12`, also typed as `c12` or `12C`. */
export function readNuclide(text: string): Reading<string> {
  const match =
    /^\s*(?:([A-Za-z]{1,2})\s*-?\s*(\d{1,3})|(\d{1,3})\s*-?\s*([A-Za-z]{1,2}))\s*$/.exec(text);
  if (!match) return { problem: 'Write a nuclide as symbol and mass number, such as C-12.' };
  const symbol = match[1] ?? match[4] ?? '';
  const mass = match[2] ?? match[3] ?? '';
  return {
    value: `${symbol.charAt(0).toUpperCase()}${symbol.slice(1).toLowerCase()}-${Number(mass)}`,
  };
}

interface NuclideFieldProps {
  pointer: string;
  value: string;
  put: (document: CaseDocument, nuclide: string) => CaseDocument;
  hint?: ReactNode;
  label?: ReactNode;
}

/** `C`, also typed as `c`. */
export function readElement(text: string): Reading<string> {
  const symbol = /^\s*([A-Za-z]{1,2})\s*$/.exec(text)?.[1];
  return symbol === undefined
    ? { problem: 'Write an element by its symbol, such as C or Au.' }
    : { value: `${symbol.charAt(0).toUpperCase()}${symbol.slice(1).toLowerCase()}` };
}

export function NuclideField(props: NuclideFieldProps) {
  return <NameField label="Nuclide" read={readNuclide} {...props} />;
}
