import { atomicElectron } from './atomic-electron.ts';
import { contactByName } from './contact-by-name.ts';
import { coulomb } from './coulomb.ts';
import { deltaShell } from './delta-shell.ts';
import { exponential } from './exponential.ts';
import { expression } from './expression/expression.ts';
import { extendedCharge } from './extended-charge.ts';
import { gaussian } from './gaussian.ts';
import { hardSphere } from './hard-sphere.ts';
import { hulthen } from './hulthen.ts';
import { krc } from './krc.ts';
import { moliere } from './moliere.ts';
import { polarization } from './polarization.ts';
import { screenedCoulomb } from './screened-coulomb.ts';
import { spinOrbit } from './spin-orbit.ts';
import { squareWell } from './square-well.ts';
import { tabulated } from './tabulated.ts';
import type { Form } from './types.ts';
import { universalIon } from './universal-ion.ts';
import { woodsSaxon } from './woods-saxon.ts';
import { yukawa } from './yukawa.ts';

/** Every form there is, in the order in which pages list them. A new form is one file and one line here. */
export const FORMS: readonly Form[] = [
  yukawa,
  coulomb,
  extendedCharge,
  screenedCoulomb,
  moliere,
  krc,
  universalIon,
  atomicElectron,
  squareWell,
  gaussian,
  exponential,
  woodsSaxon,
  deltaShell,
  hulthen,
  polarization,
  tabulated,
  expression,
  contactByName,
  hardSphere,
  spinOrbit,
];

const byKey = new Map(FORMS.map((form) => [form.key, form]));

export function formByKey(key: string): Form | undefined {
  return byKey.get(key);
}
