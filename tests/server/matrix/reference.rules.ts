import { ALLOWED_TO_ALL } from '#tests/support/walk-routes.ts';
import type { Rule } from '#tests/support/walk-routes.ts';

const OPEN: Rule = { access: 'reference.read', expect: ALLOWED_TO_ALL };

/** Published tables and the search over them: everyone signed in reads them; whose cases are found is tested beside the search. */
export const RULES: Record<string, Rule> = {
  listTables: OPEN,
  listSpecies: OPEN,
  listNuclides: OPEN,
  readNuclide: { ...OPEN, prepare: () => ({ params: { nuclide: 'Ca-40' } }) },
  listElements: OPEN,
  listNeutronLengths: OPEN,
  listMaterials: OPEN,
  listReferenceForms: OPEN,
  readReferenceForm: { ...OPEN, prepare: () => ({ params: { key: 'yukawa' } }) },
  startFromReference: OPEN,
  search: OPEN,
};
