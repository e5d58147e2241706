import type { z } from 'zod';
import type { FormDetail, FormItem, formsQuerySchema } from '#shared/contracts/reference.ts';
import { DomainError } from '#shared/errors.ts';
import type { Compute } from '#server/compute/compute.ts';
import { presentForm } from '#server/modules/forms/present-forms.ts';
import { FORMS, formByKey } from '#server/physics/potentials/register.ts';
import type { FormSheet } from './draw-form.ts';
import { fitting, rank } from './match.ts';
import { pageOf } from './paging.ts';
import { sketchOf } from './sketch.ts';
import { startDocument } from './start-documents.ts';
import { HEADS } from './table-heads.ts';

type AnyForm = (typeof FORMS)[number];

/** What people call a form besides its label. */
const ALIASES: Readonly<Record<string, readonly string[]>> = {
  coulomb: ['Rutherford', 'point charge'],
  screenedCoulomb: ['Debye', 'Wentzel', 'Thomas–Fermi'],
  moliere: ['Thomas–Fermi'],
  krc: ['krypton carbon', 'ion'],
  universalIon: ['ZBL', 'ion'],
  woodsSaxon: ['optical model', 'nuclear', 'Saxon'],
  squareWell: ['barrier', 'box', 'nuclear'],
  contact: ['Fermi pseudopotential', 'neutron'],
  atomicElectron: ['Mott–Bethe', 'scattering factor'],
  extendedCharge: ['form factor', 'Helm', 'Fermi', 'dipole', 'uniform sphere', 'nuclear charge'],
  yukawa: ['exchange', 'meson'],
  polarization: ['induced dipole', 'Buckingham'],
  tabulated: ['tabulated points', 'spline', 'own potential'],
  expression: ['expression', 'own potential'],
  hardSphere: ['billiard'],
};

export function rankForm(
  q: string,
  { key, label, source }: Pick<AnyForm, 'key' | 'label' | 'source'>,
) {
  return rank(q, { names: [label, key, ...(ALIASES[key] ?? [])], words: source });
}

/** The register does not change while the server runs, so each form is drawn once; a drawing that failed is tried again. */
const drawn = new Map<string, Promise<FormSheet>>();

function sheetOf(key: string, compute: Compute): Promise<FormSheet> {
  const kept = drawn.get(key);
  if (kept) return kept;
  const drawing = compute('formSheet', startDocument('form', key).document);
  drawn.set(key, drawing);
  drawing.catch(() => drawn.delete(key));
  return drawing;
}

/** A list does not fail over one picture that the engine refuses, as when it has too much to do. */
async function sketchIn(key: string, compute: Compute): Promise<FormItem['sketch']> {
  try {
    return sketchOf((await sheetOf(key, compute)).picture);
  } catch (error) {
    if (error instanceof DomainError) return null;
    throw error;
  }
}

export async function listForms(query: z.output<typeof formsQuerySchema>, compute: Compute) {
  const found = fitting(FORMS, (form) => rankForm(query.q ?? '', form));
  const { items, ...page } = pageOf(found, query);
  const shown: FormItem[] = await Promise.all(
    items.map(async (form) => ({
      ...presentForm(form),
      sketch: await sketchIn(form.key, compute),
    })),
  );
  return { ...page, items: shown, table: HEADS.forms };
}

/** One form with everything the register and the engine say of it. Throws DomainError('notFound'). */
export async function describeForm(key: string, compute: Compute): Promise<FormDetail> {
  const form = formByKey(key);
  if (!form) throw new DomainError('notFound', `There is no interaction form \`${key}\`.`);
  const start = startDocument('form', key);
  return {
    form: presentForm(form),
    ...(await sheetOf(key, compute)),
    start,
    table: HEADS.forms,
  };
}
