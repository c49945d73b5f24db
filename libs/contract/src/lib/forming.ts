import { z } from 'zod';
import { endpoint } from './endpoint';
import {
  idSchema,
  nameInputSchema,
  positiveQuantityInputSchema,
  quantityInputSchema,
  quantitySchema,
} from './schema-values';

/** Lengths here are in mm, forces in kN, strengths in MPa; angles are inside angles in degrees. */
const angleSchema = quantitySchema;
const GAUGE_SYSTEM_NAMES = ['steel', 'galvanized', 'stainless', 'aluminium'] as const;
/** `shipped` with the product, `changed` from what is shipped, or the shop's `own`. */
const ORIGINS = ['shipped', 'changed', 'own'] as const;
export type FormingOrigin = (typeof ORIGINS)[number];

/** What may be written in the fields of forming, with the range and an example. */
const inRange = (schema: z.ZodType<string, string>, min: number, max: number, words: string) =>
  schema.refine((text) => Number(text) >= min && Number(text) <= max, words);
const positiveInRange = (min: number, max: number, words: string) =>
  inRange(positiveQuantityInputSchema, min, max, words);
export const thicknessInputSchema = positiveInRange(
  0.1,
  50,
  'A sheet is 0.1 to 50 mm (0.004 to 2 in) thick, such as 10 ga or 3 mm.',
);
export const bendLengthInputSchema = positiveInRange(
  1,
  20_000,
  'A bend is 1 mm to 20 m (65 ft) long, such as 4 ft or 1200 mm.',
);
const openingInputSchema = positiveInRange(
  1,
  1000,
  'An opening is 1 to 1000 mm (0.04 to 39 in) wide, such as 1 in or 24 mm.',
);
const radiusInputSchema = inRange(
  quantityInputSchema,
  0,
  500,
  'A radius is 0 to 500 mm (20 in), such as 1/16 in or 2 mm.',
);
const toolLengthInputSchema = positiveInRange(
  1,
  20_000,
  'A tool is 1 mm to 20 m (65 ft) long, such as 6 ft or 835 mm.',
);
const toolAngleInputSchema = positiveInRange(1, 179, 'The angle of a tool is 1 to 179 degrees, such as 85.');
const forceLimitInputSchema = positiveInRange(
  0.001,
  100_000,
  'A force limit is above 0, such as 20 US tons per foot or 600 kN per metre.',
);
const strengthInputSchema = positiveInRange(
  50,
  2000,
  'A tensile strength is 50 to 2000 MPa (7 to 290 ksi), such as 60 ksi.',
);
const sourceInputSchema = z
  .string()
  .trim()
  .min(1, 'Say where the figure comes from, such as the mill certificate.')
  .max(300, 'At most 300 characters.');
export const materialCodeSchema = z
  .string()
  .regex(
    /^[a-z0-9][a-z0-9.-]{0,39}$/,
    'A code has small letters, digits, points and hyphens, at most 40, such as wear-plate-450.',
  );

/** A material that is bent, with the figures that forces, weights and radii are computed from. */
export const formingMaterialSchema = z.object({
  code: z.string(),
  name: z.string(),
  /** Other names under which it is found, in lower case. */
  aliases: z.array(z.string()),
  gaugeSystem: z.enum(GAUGE_SYSTEM_NAMES),
  tensileMinMpa: quantitySchema.nullable(),
  tensileUsedMpa: quantitySchema,
  tensileSource: z.string(),
  densityKgM3: quantitySchema,
  densitySource: z.string(),
  /** Inside radius of an air bend ÷ die opening. */
  radiusPerOpening: quantitySchema,
  radiusSource: z.string(),
  origin: z.enum(ORIGINS),
});
export type FormingMaterialDto = z.infer<typeof formingMaterialSchema>;
export const formingMaterialInputSchema = z
  .object({
    name: nameInputSchema,
    gaugeSystem: z.enum(GAUGE_SYSTEM_NAMES),
    tensileMinMpa: strengthInputSchema.nullable().default(null),
    tensileUsedMpa: strengthInputSchema,
    tensileSource: sourceInputSchema,
    densityKgM3: positiveInRange(
      500,
      25_000,
      'A density is 500 to 25,000 kg/m³ (0.018 to 0.9 lb/in³), such as 7850 kg/m³.',
    ),
    densitySource: sourceInputSchema,
    radiusPerOpening: positiveInRange(
      0.01,
      1,
      'The inside radius is 0.01 to 1 openings, such as 0.16 for mild steel.',
    ),
    radiusSource: sourceInputSchema,
  })
  .refine(({ tensileMinMpa, tensileUsedMpa }) => Number(tensileMinMpa ?? 0) <= Number(tensileUsedMpa), {
    path: ['tensileUsedMpa'],
    message: 'The strength used cannot lie below the minimum: forces would come out too low.',
  });
export type FormingMaterialInput = z.input<typeof formingMaterialInputSchema>;

/** A gauge of the shop's chart that differs from the shipped tables, or is not in them. */
export const shopGaugeSchema = z.object({
  system: z.enum(GAUGE_SYSTEM_NAMES),
  gauge: z.number().int(),
  thicknessMm: quantitySchema,
  source: z.string(),
  origin: z.enum(ORIGINS),
});
export type ShopGauge = z.infer<typeof shopGaugeSchema>;
export const shopGaugeInputSchema = z.object({
  thicknessMm: thicknessInputSchema,
  source: sourceInputSchema,
});
export type ShopGaugeInput = z.input<typeof shopGaugeInputSchema>;

/** A press as forming needs it. */
export const formingMachineSchema = z.object({
  machineId: idSchema,
  code: z.string(),
  name: z.string(),
  kind: z.string(),
  ratedForceKn: quantitySchema.nullable(),
  bedLengthMm: quantitySchema.nullable(),
});
export type FormingMachine = z.infer<typeof formingMachineSchema>;

export const punchSchema = z.object({
  punchId: idSchema,
  machineId: idSchema,
  name: z.string(),
  noseRadiusMm: quantitySchema,
  angle: angleSchema.nullable(),
  lengthMm: quantitySchema.nullable(),
  forceLimitKnPerM: quantitySchema.nullable(),
});
export type Punch = z.infer<typeof punchSchema>;
export const punchInputSchema = z.object({
  name: nameInputSchema,
  noseRadiusMm: radiusInputSchema,
  angle: toolAngleInputSchema.nullable().default(null),
  lengthMm: toolLengthInputSchema.nullable().default(null),
  forceLimitKnPerM: forceLimitInputSchema.nullable().default(null),
});
export type PunchInput = z.input<typeof punchInputSchema>;

export const dieOpeningSchema = z.object({
  dieOpeningId: idSchema,
  openingMm: quantitySchema,
  angle: angleSchema.nullable(),
  shoulderRadiusMm: quantitySchema.nullable(),
});
export type DieOpening = z.infer<typeof dieOpeningSchema>;
export const dieSchema = z.object({
  dieId: idSchema,
  machineId: idSchema,
  name: z.string(),
  lengthMm: quantitySchema.nullable(),
  forceLimitKnPerM: quantitySchema.nullable(),
  /** Narrowest first. */
  openings: z.array(dieOpeningSchema),
});
export type Die = z.infer<typeof dieSchema>;
export const dieInputSchema = z
  .object({
    name: nameInputSchema,
    lengthMm: toolLengthInputSchema.nullable().default(null),
    forceLimitKnPerM: forceLimitInputSchema.nullable().default(null),
    /** All of them: one that is there and left out is taken away, if nothing was bent on it. */
    openings: z
      .array(
        z.object({
          /** Of an opening that is there; left out for a new one. */
          dieOpeningId: idSchema.optional(),
          openingMm: openingInputSchema,
          angle: toolAngleInputSchema.nullable().default(null),
          shoulderRadiusMm: radiusInputSchema.nullable().default(null),
        }),
      )
      .min(1, 'A die has at least one opening.')
      .max(20, 'At most 20 openings.'),
  })
  .superRefine(({ openings }, context) => {
    for (const [index, { openingMm }] of openings.entries()) {
      if (openings.findIndex((other) => Number(other.openingMm) === Number(openingMm)) < index) {
        const message = 'This die has an opening of that width already.';
        context.addIssue({ code: 'custom', path: ['openings', index, 'openingMm'], message });
      }
    }
  });
export type DieInput = z.input<typeof dieInputSchema>;

/** All that bends are computed from in this shop. */
export const formingReferenceSchema = z.object({
  /** The share of a rating, in percent, that the shop keeps below. */
  forceLinePercent: quantitySchema,
  /** Presses first: those with a rating, a bed, or tools. */
  machines: z.array(formingMachineSchema),
  materials: z.array(formingMaterialSchema),
  /** What differs from the tables that are shipped. */
  gauges: z.array(shopGaugeSchema),
  punches: z.array(punchSchema),
  dies: z.array(dieSchema),
});
export type FormingReference = z.infer<typeof formingReferenceSchema>;
export const forceLineInputSchema = z.object({
  forceLinePercent: positiveInRange(1, 100, 'The line is 1 to 100 percent of the rating, such as 80.'),
});
export type ForceLineInput = z.input<typeof forceLineInputSchema>;

const materialCode = z.object({ code: materialCodeSchema });
const gaugeParams = z.object({
  system: z.enum(GAUGE_SYSTEM_NAMES),
  gauge: z.coerce
    .number()
    .int()
    .min(0, 'Gauges are 0 to 50, such as 16.')
    .max(50, 'Gauges are 0 to 50, such as 16.'),
});
const machineId = z.object({ machineId: idSchema });
const punchId = z.object({ punchId: idSchema });
const dieId = z.object({ dieId: idSchema });
export const formingEndpoints = {
  getFormingReference: endpoint({
    method: 'get',
    path: '/forming/reference',
    summary: 'Machines, punches, dies, materials and gauges that bends are computed from',
    permission: 'forming.use',
    response: formingReferenceSchema,
  }),
  updateForceLine: endpoint({
    method: 'patch',
    path: '/forming/force-line',
    summary: 'Change the share of a rating that the shop keeps below',
    permission: 'tooling.edit',
    body: forceLineInputSchema,
    response: null,
  }),
  createFormingMaterial: endpoint({
    method: 'post',
    path: '/forming/materials',
    summary: 'Add a material of the shop’s own',
    permission: 'tooling.edit',
    body: formingMaterialInputSchema.safeExtend({ code: materialCodeSchema }),
    response: formingMaterialSchema,
  }),
  updateFormingMaterial: endpoint({
    method: 'patch',
    path: '/forming/materials/:code',
    summary: 'Change a material, shipped or own',
    permission: 'tooling.edit',
    params: materialCode,
    body: formingMaterialInputSchema,
    response: formingMaterialSchema,
  }),
  deleteFormingMaterial: endpoint({
    method: 'delete',
    path: '/forming/materials/:code',
    summary: 'Take an own material out, or put a shipped one back to what is shipped',
    permission: 'tooling.edit',
    params: materialCode,
    response: null,
  }),
  updateShopGauge: endpoint({
    method: 'patch',
    path: '/forming/gauges/:system/:gauge',
    summary: 'Say how thick a gauge is in this shop',
    permission: 'tooling.edit',
    params: gaugeParams,
    body: shopGaugeInputSchema,
    response: shopGaugeSchema,
  }),
  deleteShopGauge: endpoint({
    method: 'delete',
    path: '/forming/gauges/:system/:gauge',
    summary: 'Put a gauge back to what is shipped',
    permission: 'tooling.edit',
    params: gaugeParams,
    response: null,
  }),
  createPunch: endpoint({
    method: 'post',
    path: '/machines/:machineId/punches',
    summary: 'Add a punch of a machine',
    permission: 'tooling.edit',
    params: machineId,
    body: punchInputSchema,
    response: punchSchema,
  }),
  updatePunch: endpoint({
    method: 'patch',
    path: '/punches/:punchId',
    summary: 'Change a punch',
    permission: 'tooling.edit',
    params: punchId,
    body: punchInputSchema,
    response: punchSchema,
  }),
  deletePunch: endpoint({
    method: 'delete',
    path: '/punches/:punchId',
    summary: 'Take a punch out, if nothing was bent with it',
    permission: 'tooling.edit',
    params: punchId,
    response: null,
  }),
  createDie: endpoint({
    method: 'post',
    path: '/machines/:machineId/dies',
    summary: 'Add a die of a machine with its openings',
    permission: 'tooling.edit',
    params: machineId,
    body: dieInputSchema,
    response: dieSchema,
  }),
  updateDie: endpoint({
    method: 'patch',
    path: '/dies/:dieId',
    summary: 'Change a die and its openings',
    permission: 'tooling.edit',
    params: dieId,
    body: dieInputSchema,
    response: dieSchema,
  }),
  deleteDie: endpoint({
    method: 'delete',
    path: '/dies/:dieId',
    summary: 'Take a die out, if nothing was bent on it',
    permission: 'tooling.edit',
    params: dieId,
    response: null,
  }),
};
