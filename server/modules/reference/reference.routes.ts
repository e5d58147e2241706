import { z } from 'zod';
import {
  elementsQuerySchema,
  elementsTableSchema,
  formDetailSchema,
  formsQuerySchema,
  formsTableSchema,
  materialsQuerySchema,
  materialsTableSchema,
  neutronQuerySchema,
  neutronTableSchema,
  nuclideDetailSchema,
  nuclidesQuerySchema,
  nuclidesTableSchema,
  overviewSchema,
  speciesQuerySchema,
  speciesTableSchema,
  startQuerySchema,
  startSchema,
} from '#shared/contracts/reference.ts';
import { defineRoute } from '#server/http/route.ts';
import { cacheable } from './cacheable.ts';
import { describeNuclide } from './describe-nuclide.ts';
import { describeForm, listForms } from './forms.ts';
import { listElements } from './list-elements.ts';
import { listMaterials } from './list-materials.ts';
import { listNeutronLengths } from './list-neutron-lengths.ts';
import { listNuclides } from './list-nuclides.ts';
import { listSpecies } from './list-species.ts';
import { OVERVIEW } from './overview.ts';
import { startDocument } from './start-documents.ts';

const name = z.string().min(1).max(60);
const common = { method: 'get', tag: 'Reference', access: 'reference.read' } as const;

export const referenceRoutes = [
  defineRoute({
    ...common,
    path: '/api/reference',
    operationId: 'listTables',
    summary: 'The published tables, with edition, source, licence and number of entries',
    response: overviewSchema,
    handler: ({ setHeader }) => cacheable(setHeader, OVERVIEW),
  }),
  defineRoute({
    ...common,
    path: '/api/reference/species',
    operationId: 'listSpecies',
    summary: 'Particles by name: mass, charge, spin',
    query: speciesQuerySchema,
    response: speciesTableSchema,
    handler: ({ query, setHeader }) => cacheable(setHeader, listSpecies(query)),
  }),
  defineRoute({
    ...common,
    path: '/api/reference/nuclides',
    operationId: 'listNuclides',
    summary: 'Nuclides: atomic mass, abundance, spin; found as Ca-40, 40Ca or calcium 40',
    query: nuclidesQuerySchema,
    response: nuclidesTableSchema,
    handler: ({ query, setHeader }) => cacheable(setHeader, listNuclides(query)),
  }),
  defineRoute({
    ...common,
    path: '/api/reference/nuclides/:nuclide',
    operationId: 'readNuclide',
    summary: 'One nuclide: everything the tables know of it',
    params: z.object({ nuclide: name }),
    response: nuclideDetailSchema,
    handler: ({ params, setHeader }) => cacheable(setHeader, describeNuclide(params.nuclide)),
  }),
  defineRoute({
    ...common,
    path: '/api/reference/elements',
    operationId: 'listElements',
    summary: 'Elements: standard atomic weight, phase and density',
    query: elementsQuerySchema,
    response: elementsTableSchema,
    handler: ({ query, setHeader }) => cacheable(setHeader, listElements(query)),
  }),
  defineRoute({
    ...common,
    path: '/api/reference/neutron-lengths',
    operationId: 'listNeutronLengths',
    summary: 'Neutron scattering lengths and cross sections, with cautions in words',
    query: neutronQuerySchema,
    response: neutronTableSchema,
    handler: ({ query, setHeader }) => cacheable(setHeader, listNeutronLengths(query)),
  }),
  defineRoute({
    ...common,
    path: '/api/reference/materials',
    operationId: 'listMaterials',
    summary: 'Materials: formula, density, formula units per volume',
    query: materialsQuerySchema,
    response: materialsTableSchema,
    handler: ({ query, setHeader }) => cacheable(setHeader, listMaterials(query)),
  }),
  defineRoute({
    ...common,
    path: '/api/reference/forms',
    operationId: 'listReferenceForms',
    summary: 'Interaction forms with all parameters and a small drawing of V(r)',
    query: formsQuerySchema,
    response: formsTableSchema,
    handler: async ({ query, compute, setHeader }) =>
      cacheable(setHeader, await listForms(query, compute)),
  }),
  defineRoute({
    ...common,
    path: '/api/reference/forms/:key',
    operationId: 'readReferenceForm',
    summary: 'One form: formula, parameters, limits, and V(r) and its transform for the defaults',
    params: z.object({ key: name }),
    response: formDetailSchema,
    handler: async ({ params, compute, setHeader }) =>
      cacheable(setHeader, await describeForm(params.key, compute)),
  }),
  defineRoute({
    ...common,
    path: '/api/reference/start',
    operationId: 'startFromReference',
    summary:
      'A document for a new case with this form, nuclide, particle, length or material in it',
    query: startQuerySchema,
    response: startSchema,
    handler: ({ query, setHeader }) => cacheable(setHeader, startDocument(query.kind, query.name)),
  }),
];
