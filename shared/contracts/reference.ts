import { z } from 'zod';
import { caseDocumentSchema, summarySchema } from './cases.ts';
import { formSchema } from './forms.ts';
import { listSchema, pageQuerySchema } from './list.ts';

/* What the Reference pages are made of: published tables, each answer with the edition it was read from. */

const quantity = z.object({ value: z.number(), unit: z.string() });
/** A published number; `uncertainty` is the standard one, in the same unit, where the table prints it. */
export const measuredSchema = quantity.extend({ uncertainty: z.number().optional() });
export type Measured = z.infer<typeof measuredSchema>;

/** Where numbers come from. */
export const tableHeadSchema = z
  .object({
    key: z.string(),
    title: z.string(),
    edition: z.string(),
    source: z.string(),
    licence: z.string(),
    notes: z.array(z.string()),
  })
  .meta({ id: 'TableHead' });
export type TableHead = z.infer<typeof tableHeadSchema>;

function tableOf<T extends z.ZodType>(item: T) {
  return listSchema(item).extend({ table: tableHeadSchema });
}

const search = z.string().max(200).optional();
const symbol = z.string().max(3).optional();

/** A sort key and the same with a minus before it, for falling order. */
function sorts<const K extends string>(keys: readonly K[]) {
  const both = keys.flatMap((key) => [key, `-${key}` as const]);
  return z.enum(both as [K | `-${K}`, ...(K | `-${K}`)[]]).optional();
}

export const SPECIES_SORTS = ['label', 'mass', 'charge', 'spin'] as const;
export const NUCLIDE_SORTS = [
  'nuclide',
  'atomicNumber',
  'massNumber',
  'atomicMass',
  'abundance',
  'spin',
] as const;
export const ELEMENT_SORTS = ['atomicNumber', 'symbol', 'name', 'weight', 'density'] as const;
export const NEUTRON_SORTS = [
  'name',
  'b',
  'sigmaCoherent',
  'sigmaIncoherent',
  'sigmaAbsorption',
] as const;
export const MATERIAL_SORTS = ['label', 'formula', 'density', 'molarMass'] as const;

export const speciesQuerySchema = pageQuerySchema.extend({ q: search, sort: sorts(SPECIES_SORTS) });
export const nuclidesQuerySchema = pageQuerySchema.extend({
  q: search,
  element: symbol,
  /** `natural`: only what occurs in ordinary terrestrial material. */
  occurrence: z.enum(['natural', 'all']).optional(),
  sort: sorts(NUCLIDE_SORTS),
});
export const elementsQuerySchema = pageQuerySchema.extend({
  q: search,
  sort: sorts(ELEMENT_SORTS),
});
export const neutronQuerySchema = pageQuerySchema.extend({
  q: search,
  element: symbol,
  /** Only entries with this caution. */
  caution: z.enum(['resonant', 'contradiction']).optional(),
  sort: sorts(NEUTRON_SORTS),
});
export const materialsQuerySchema = pageQuerySchema.extend({
  q: search,
  phase: z.enum(['solid', 'liquid', 'gas']).optional(),
  sort: sorts(MATERIAL_SORTS),
});
export const formsQuerySchema = pageQuerySchema.extend({ q: search });

export const speciesItemSchema = z.object({
  key: z.string(),
  label: z.string(),
  kind: z.enum(['lepton', 'nucleon', 'nucleus']),
  /** mc². */
  mass: measuredSchema,
  charge: z.int(),
  spin: z.number(),
  nuclide: z.string().nullable(),
});
export type SpeciesItem = z.infer<typeof speciesItemSchema>;

export const nuclideItemSchema = z.object({
  nuclide: z.string(),
  symbol: z.string(),
  element: z.string(),
  atomicNumber: z.int(),
  massNumber: z.int(),
  /** Of the neutral atom. */
  atomicMass: quantity,
  /** Mole fraction in ordinary terrestrial material; null where it does not occur. */
  abundance: z.number().nullable(),
  spin: z.number().nullable(),
});
export type NuclideItem = z.infer<typeof nuclideItemSchema>;

export const elementItemSchema = z.object({
  atomicNumber: z.int(),
  symbol: z.string(),
  name: z.string(),
  weight: measuredSchema.nullable(),
  /** Lowest and highest standard weight where natural material varies. */
  interval: z.tuple([z.number(), z.number()]).nullable(),
  phase: z.enum(['solid', 'liquid', 'gas', 'unknown']),
  density: quantity.nullable(),
  densityNote: z.string(),
  /** The most abundant isotope; null where none occurs in nature. */
  mainIsotope: z.string().nullable(),
  naturalIsotopes: z.int(),
});
export type ElementItem = z.infer<typeof elementItemSchema>;

export const neutronItemSchema = z.object({
  name: z.string(),
  symbol: z.string(),
  /** True for an isotope, false for an element as it occurs. */
  isotope: z.boolean(),
  b: measuredSchema.nullable(),
  /** -b'' as printed. */
  imaginary: quantity.nullable(),
  sigmaCoherent: measuredSchema.nullable(),
  sigmaIncoherent: measuredSchema.nullable(),
  /** At 1.798 angstrom. */
  sigmaAbsorption: measuredSchema.nullable(),
  resonant: z.boolean(),
  contradictory: z.boolean(),
  /** What to know before use, in words. */
  cautions: z.array(z.string()),
});
export type NeutronItem = z.infer<typeof neutronItemSchema>;

export const materialItemSchema = z.object({
  key: z.string(),
  label: z.string(),
  formula: z.string(),
  phase: z.enum(['solid', 'liquid', 'gas']),
  molarMass: quantity,
  /** At 20 °C and one atmosphere; null for gases. */
  density: quantity.nullable(),
  /** Lowest and highest density sold under this name. */
  range: z.tuple([quantity, quantity]).nullable(),
  /** Formula units per volume; null for gases. */
  unitsPerVolume: quantity.nullable(),
  source: z.string(),
  notes: z.string(),
});
export type MaterialItem = z.infer<typeof materialItemSchema>;

export const speciesTableSchema = tableOf(speciesItemSchema);
export const nuclidesTableSchema = tableOf(nuclideItemSchema);
export const elementsTableSchema = tableOf(elementItemSchema);
export const neutronTableSchema = tableOf(neutronItemSchema);
export const materialsTableSchema = tableOf(materialItemSchema);

/** Everything the tables know of one nuclide. */
export const nuclideDetailSchema = nuclideItemSchema.extend({
  /** mc² of the bare nucleus. */
  nuclearMass: quantity,
  /** The name it has as a particle, as alpha for He-4. */
  species: z.string().nullable(),
  charge: z
    .object({
      rms: quantity,
      rmsSource: z.string(),
      fermi: z
        .object({ c: quantity, a: quantity, origin: z.string(), check: z.string() })
        .nullable(),
    })
    .nullable(),
  neutron: neutronItemSchema.nullable(),
  /** Isotopes of the element that occur in nature. */
  isotopes: z.array(nuclideItemSchema),
  tables: z.array(tableHeadSchema),
});
export type NuclideDetail = z.infer<typeof nuclideDetailSchema>;

const unavailable = z.object({ unavailable: z.literal(true), reason: z.string() });

/** V(r) and its transform for the defaults of a form; `im` where absorption is not zero. */
export const formPictureSchema = z.object({
  potential: z.union([
    z.object({
      r: z.array(z.number()),
      re: z.array(z.number()),
      im: z.array(z.number()).optional(),
      unit: z.object({ r: z.string(), v: z.string() }),
    }),
    unavailable,
  ]),
  /** ∫ r² V(r) j0(qr) dr over r from 0 to infinity. */
  transform: z.union([
    z.object({
      q: z.array(z.number()),
      re: z.array(z.number()),
      im: z.array(z.number()).optional(),
      /** Largest numerical error of a point, as a fraction of the largest value. */
      error: z.number(),
      unit: z.object({ q: z.string(), s: z.string() }),
    }),
    unavailable,
  ]),
});
export type FormPicture = z.infer<typeof formPictureSchema>;

/** A form in the register's list, with a small drawing of V(r) between -1 and 1. */
export const formItemSchema = formSchema.extend({
  sketch: z.array(z.tuple([z.number(), z.number()])).nullable(),
});
export type FormItem = z.infer<typeof formItemSchema>;
export const formsTableSchema = tableOf(formItemSchema);

/** A document for a new case, with something from a table in its place and the rest sensible. */
export const startSchema = z
  .object({ title: z.string(), summary: summarySchema, document: caseDocumentSchema })
  .meta({ id: 'Start' });
export type Start = z.infer<typeof startSchema>;

export const START_KINDS = ['form', 'nuclide', 'species', 'neutron', 'material'] as const;
export type StartKind = (typeof START_KINDS)[number];
export const startQuerySchema = z.object({
  kind: z.enum(START_KINDS),
  name: z.string().min(1).max(60),
});

export const formDetailSchema = z.object({
  form: formSchema,
  picture: formPictureSchema,
  /** Behaviour and limits, in words. */
  remarks: z.array(z.string()),
  /** What the picture was drawn for. */
  start: startSchema,
  table: tableHeadSchema,
});
export type FormDetail = z.infer<typeof formDetailSchema>;

/** The overview: every table with how much it holds. */
export const overviewSchema = z.object({
  tables: z.array(tableHeadSchema.extend({ entries: z.int() })),
});
export type Overview = z.infer<typeof overviewSchema>;
