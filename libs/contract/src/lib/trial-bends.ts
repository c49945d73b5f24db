import { z } from 'zod';
import { endpoint } from './endpoint';
import { bendLengthInputSchema, materialCodeSchema, thicknessInputSchema } from './forming';
import { idSchema, instantSchema, localDateSchema, pageQuerySchema, quantitySchema } from './schema-values';

/** Lengths are in mm, angles are inside angles in degrees. */
export const trialBendSchema = z.object({
  trialBendId: idSchema,
  machineId: idSchema,
  machine: z.string(),
  punchId: idSchema,
  punch: z.string(),
  noseRadiusMm: quantitySchema,
  dieOpeningId: idSchema,
  die: z.string(),
  openingMm: quantitySchema,
  shoulderRadiusMm: quantitySchema.nullable(),
  materialCode: z.string(),
  /** The code again, if the material is no longer there. */
  material: z.string(),
  thicknessMm: quantitySchema,
  /** Of the strip that was bent; null if nobody noted it. */
  stripWidthMm: quantitySchema.nullable(),
  /** The reading of the ram; it grows as the ram goes down, its zero is the machine's own. */
  depthMm: quantitySchema,
  measuredAngle: quantitySchema,
  /** Bent over the full length of the work: corrects the datum of narrow strips. */
  isFullLength: z.boolean(),
  bentBy: z.string(),
  bentOn: localDateSchema,
  voidedAt: instantSchema.nullable(),
  voidedBy: z.string().nullable(),
});
export type TrialBendDto = z.infer<typeof trialBendSchema>;

const DEPTH_WORDS = 'A reading of the ram is a number between -5000 and 5000 mm, such as 12.35.';
const ANGLE_WORDS =
  'An inside angle is 20 to 175 degrees, measured on the finished part (180 is flat), such as 90.5.';
const depthInputSchema = z
  .string()
  .trim()
  .regex(/^-?\d{1,4}(\.\d{1,5})?$/, DEPTH_WORDS)
  .refine((text) => Math.abs(Number(text)) <= 5000, DEPTH_WORDS);
const insideAngleInputSchema = z
  .string()
  .trim()
  .regex(/^\d{1,3}(\.\d{1,4})?$/, ANGLE_WORDS)
  .refine((text) => Number(text) >= 20 && Number(text) <= 175, ANGLE_WORDS);

const trialSetup = {
  machineId: idSchema,
  punchId: idSchema,
  dieOpeningId: idSchema,
  materialCode: materialCodeSchema,
};
export const trialBendInputSchema = z.object({
  ...trialSetup,
  thicknessMm: thicknessInputSchema,
  stripWidthMm: bendLengthInputSchema.nullable().default(null),
  depthMm: depthInputSchema,
  measuredAngle: insideAngleInputSchema,
  isFullLength: z.boolean().default(false),
  /** Left out: who is signed in. */
  bentBy: z.string().trim().min(1, 'Must not be empty.').max(200, 'At most 200 characters.').optional(),
  /** Left out: today. */
  bentOn: localDateSchema.optional(),
});
export type TrialBendInput = z.input<typeof trialBendInputSchema>;

/** Trial bends of one set-up, copied from a sheet. */
export const trialBendPasteSchema = z.object({
  ...trialSetup,
  /**
   * Tab- or comma-separated, with a header: depth and angle, and if need be thickness, width, full length (yes or
   * no), bent by, bent on. Each length says its unit, such as `Depth (mm)`.
   */
  text: z.string().max(200_000, 'At most 200,000 characters at once.'),
  /** Of all rows, if there is no such column. */
  thicknessMm: thicknessInputSchema.nullable().default(null),
});
export type TrialBendPaste = z.input<typeof trialBendPasteSchema>;
export const trialBendPasteResultSchema = z.object({
  items: z.array(trialBendSchema),
  /** Columns of the header that nothing was made of. */
  columnsIgnored: z.array(z.string()),
});
export type TrialBendPasteResult = z.infer<typeof trialBendPasteResultSchema>;

export const trialBendQuerySchema = pageQuerySchema.extend({
  machineId: idSchema.optional(),
  punchId: idSchema.optional(),
  dieOpeningId: idSchema.optional(),
  materialCode: materialCodeSchema.optional(),
  show: z.enum(['live', 'voided', 'all']).default('live'),
});
export type TrialBendQuery = z.infer<typeof trialBendQuerySchema>;
export const trialBendPageSchema = z.object({
  /** Latest first. */
  items: z.array(trialBendSchema),
  nextCursor: z.string().nullable(),
});
export type TrialBendPage = z.infer<typeof trialBendPageSchema>;

const figure = z.number();
/** What is missing or wrong, in words. */
const refusalSchema = z.object({ code: z.string(), message: z.string() });
const depthAnswerSchema = z.object({
  depthMm: figure,
  lowMm: figure,
  highMm: figure,
  /** The band in degrees to either side; 9 of 10 single bends lie in it. */
  bandAngle: figure,
  /** No trial was bent with this sheet on this opening: geometry alone. */
  isGuess: z.boolean(),
});
const angleAnswerSchema = z.object({
  insideAngle: figure,
  low: figure,
  high: figure,
  isGuess: z.boolean(),
});
export const depthFitQuerySchema = z.object({
  ...trialSetup,
  /** Left out: the sheet of the latest trial bend. */
  thicknessMm: thicknessInputSchema.optional(),
  /** Asks for the depth of this angle. */
  angle: insideAngleInputSchema.optional(),
  /** Asks for the angle at this reading. */
  depthMm: depthInputSchema.optional(),
});
export type DepthFitQuery = z.input<typeof depthFitQuerySchema>;
export const depthFitSchema = z.object({
  /** Trial bends on this opening, or on all openings with this punch and material where it has too few. */
  from: z.enum(['opening', 'machine']),
  /** Why there is no fit, and what to bend next; null if there is one. */
  refusal: refusalSchema.nullable(),
  fit: z
    .object({
      datumMm: figure,
      datumErrorMm: figure,
      springback: figure,
      springbackError: figure,
      rmsAngle: figure,
      /** Error with each bend left out of its own fit; null if one of those fits fails. */
      looAngle: figure.nullable(),
      angleMin: figure,
      angleMax: figure,
      notes: z.array(z.string()),
    })
    .nullable(),
  /** The bends that were fitted: measured − fitted inside angle. */
  bends: z.array(
    z.object({
      trialBendId: idSchema,
      error: figure,
      looError: figure.nullable(),
      isOutlier: z.boolean(),
    }),
  ),
  /** The full-length bend that the datum of narrow strips was moved by; null if there is none. */
  correction: z.object({ trialBendId: idSchema, shiftMm: figure }).nullable(),
  thicknessMm: figure.nullable(),
  depth: depthAnswerSchema.or(refusalSchema).nullable(),
  angle: angleAnswerSchema.or(refusalSchema).nullable(),
});
export type DepthFit = z.infer<typeof depthFitSchema>;

export const depthCardSheetSchema = z.object({
  materialCode: z.string(),
  thicknessMm: quantitySchema,
  punchId: idSchema,
  dieOpeningId: idSchema,
});
export const depthCardSchema = z.object({
  machineId: idSchema,
  angles: z.array(figure),
  /** A row of the card with a cell for each angle. */
  sheets: z.array(
    depthCardSheetSchema.extend({
      material: z.string(),
      punch: z.string(),
      die: z.string(),
      openingMm: quantitySchema,
      cells: z.array(depthAnswerSchema.or(refusalSchema)),
    }),
  ),
});
export type DepthCard = z.infer<typeof depthCardSchema>;
export const depthCardInputSchema = z.object({
  angles: z
    .array(z.number().min(20, ANGLE_WORDS).max(175, ANGLE_WORDS))
    .min(1, 'A card has at least one angle.')
    .max(12, 'At most 12 angles fit on a card.'),
  sheets: z
    .array(
      z.object({
        materialCode: materialCodeSchema,
        thicknessMm: thicknessInputSchema,
        punchId: idSchema,
        dieOpeningId: idSchema,
      }),
    )
    .max(30, 'At most 30 sheets fit on a card.'),
});
export type DepthCardInput = z.input<typeof depthCardInputSchema>;

const trialBendId = z.object({ trialBendId: idSchema });
const machineId = z.object({ machineId: idSchema });
export const trialBendEndpoints = {
  listTrialBends: endpoint({
    method: 'get',
    path: '/trial-bends',
    summary: 'A page of trial bends, latest first',
    permission: 'forming.use',
    query: trialBendQuerySchema,
    response: trialBendPageSchema,
  }),
  createTrialBend: endpoint({
    method: 'post',
    path: '/trial-bends',
    summary: 'Note a trial bend',
    permission: 'press-runs.log',
    body: trialBendInputSchema,
    response: trialBendSchema,
  }),
  pasteTrialBends: endpoint({
    method: 'post',
    path: '/trial-bends/paste',
    summary: 'Note trial bends copied from a sheet, all or none',
    permission: 'press-runs.log',
    body: trialBendPasteSchema,
    response: trialBendPasteResultSchema,
  }),
  voidTrialBend: endpoint({
    method: 'post',
    path: '/trial-bends/:trialBendId/void',
    summary: 'Void a trial bend; the fit goes without it',
    permission: 'press-runs.log',
    params: trialBendId,
    response: null,
  }),
  restoreTrialBend: endpoint({
    method: 'post',
    path: '/trial-bends/:trialBendId/restore',
    summary: 'Take back the voiding of a trial bend',
    permission: 'press-runs.log',
    params: trialBendId,
    response: null,
  }),
  getDepthFit: endpoint({
    method: 'get',
    path: '/forming/depth-fit',
    summary: 'Ram depth fitted to the trial bends of a set-up, answered both ways',
    permission: 'forming.use',
    query: depthFitQuerySchema,
    response: depthFitSchema,
  }),
  getDepthCard: endpoint({
    method: 'get',
    path: '/machines/:machineId/depth-card',
    summary: 'Depths of the shop’s usual sheets and angles on a machine',
    permission: 'forming.use',
    params: machineId,
    response: depthCardSchema,
  }),
  updateDepthCard: endpoint({
    method: 'patch',
    path: '/machines/:machineId/depth-card',
    summary: 'Say which sheets and angles stand on the card',
    permission: 'tooling.edit',
    params: machineId,
    body: depthCardInputSchema,
    response: depthCardSchema,
  }),
};
