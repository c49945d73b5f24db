import { z } from 'zod';
import { endpoint } from './endpoint';
import {
  amountInputSchema,
  codeInputSchema,
  countInputSchema,
  idSchema,
  instantSchema,
  localDateSchema,
  moneySchema,
  nameInputSchema,
  pageQuerySchema,
  positiveAmountInputSchema,
  positiveQuantityInputSchema,
  positiveWeightInputSchema,
  quantitySchema,
  rateInputSchema,
  rateSchema,
  weightSchema,
} from './schema-values';

export const MATERIAL_FORMS = ['sheet', 'plate', 'bar', 'tube', 'other'] as const;
export type MaterialForm = (typeof MATERIAL_FORMS)[number];

/** A material with its stock. Money is absent for those without `materials.money`. */
export const materialSchema = z.object({
  materialId: idSchema,
  name: z.string(),
  grade: z.string(),
  form: z.enum(MATERIAL_FORMS),
  /** As typed, such as `11 ga`; null if the thickness was given as a length. */
  gauge: z.string().nullable(),
  thicknessMm: quantitySchema.nullable(),
  densityKgM3: quantitySchema.nullable(),
  tensileStrengthMpa: quantitySchema.nullable(),
  recoveryPricePerKg: rateSchema.optional(),
  stockKg: weightSchema,
  /** What the stock has cost. */
  stockValue: moneySchema.optional(),
  /** Value ÷ weight in stock; of the last stock there was if there is none now, null if there never was a lot. */
  averagePerKg: rateSchema.nullable().optional(),
  /** The lot received last, with the size of its sheets to start the next from. */
  lastLot: z
    .object({
      number: z.string(),
      receivedOn: localDateSchema,
      vendor: z.string(),
      sheetLengthMm: quantitySchema.nullable(),
      sheetWidthMm: quantitySchema.nullable(),
    })
    .nullable(),
});
export type Material = z.infer<typeof materialSchema>;

export const materialInputSchema = z
  .object({
    name: nameInputSchema,
    grade: z.string().trim().max(100, 'At most 100 characters.').default(''),
    form: z.enum(MATERIAL_FORMS),
    gauge: z.string().trim().min(1).max(20).nullable().default(null),
    thicknessMm: positiveQuantityInputSchema.nullable().default(null),
    densityKgM3: positiveQuantityInputSchema.nullable().default(null),
    tensileStrengthMpa: positiveQuantityInputSchema.nullable().default(null),
    recoveryPricePerKg: rateInputSchema.default('0'),
  })
  .refine(({ gauge, thicknessMm }) => gauge === null || thicknessMm !== null, {
    path: ['thicknessMm'],
    message: 'Say how thick this gauge is in the material.',
  });
export type MaterialInput = z.input<typeof materialInputSchema>;

const NO_WEIGHT = 'Say the weight, or how many with their length and width.';

/** Sheets of a lot or an issue, or blanks: how many, how long, how wide; or the weight itself. */
interface Measured {
  weightKg: string | null;
  sheets: number | null;
  pieces?: number | null;
}

function checkMeasure(value: Measured, size: readonly [string, string | null][], context: z.RefinementCtx) {
  const refuse = (path: string, message: string) =>
    context.addIssue({ code: 'custom', path: [path], message });
  if (value.sheets !== null && (value.pieces ?? null) !== null) {
    refuse('pieces', 'Say either sheets or pieces, not both.');
  }
  if (value.weightKg !== null) return;
  if (value.sheets === null && (value.pieces ?? null) === null) refuse('weightKg', NO_WEIGHT);
  else for (const [field, length] of size) if (length === null) refuse(field, NO_WEIGHT);
}

/** The weight counts if it is given; else it is sheets × length × width × thickness × density. */
export const sheetLotInputSchema = z
  .object({
    /** Null: the next number of the shop's own. */
    number: codeInputSchema.nullable().default(null),
    receivedOn: localDateSchema,
    vendor: z.string().trim().max(200, 'At most 200 characters.').default(''),
    sheets: countInputSchema.nullable().default(null),
    sheetLengthMm: positiveQuantityInputSchema.nullable().default(null),
    sheetWidthMm: positiveQuantityInputSchema.nullable().default(null),
    weightKg: positiveWeightInputSchema.nullable().default(null),
    cost: positiveAmountInputSchema,
    freight: amountInputSchema.default('0'),
  })
  .superRefine((lot, context) =>
    checkMeasure(
      lot,
      [
        ['sheetLengthMm', lot.sheetLengthMm],
        ['sheetWidthMm', lot.sheetWidthMm],
      ],
      context,
    ),
  );
export type SheetLotInput = z.input<typeof sheetLotInputSchema>;
export const sheetLotSchema = z.object({
  lotId: idSchema,
  number: z.string(),
  materialId: idSchema,
  receivedOn: localDateSchema,
  weightKg: weightSchema,
  /** Cost + freight. */
  landedCost: moneySchema,
});
export type SheetLot = z.infer<typeof sheetLotSchema>;

export const ISSUE_KINDS = ['issue', 'return'] as const;
export type IssueKind = (typeof ISSUE_KINDS)[number];

/** The weight counts if it is given; else it is sheets or pieces × length × width × thickness × density. */
export const materialIssueInputSchema = z
  .object({
    jobId: idSchema,
    materialId: idSchema,
    kind: z.enum(ISSUE_KINDS),
    issuedOn: localDateSchema,
    sheets: countInputSchema.nullable().default(null),
    pieces: countInputSchema.nullable().default(null),
    /** Of a blank, or of a sheet. */
    blankLengthMm: positiveQuantityInputSchema.nullable().default(null),
    blankWidthMm: positiveQuantityInputSchema.nullable().default(null),
    weightKg: positiveWeightInputSchema.nullable().default(null),
    note: z.string().trim().max(300, 'At most 300 characters.').nullable().default(null),
  })
  .superRefine((issue, context) =>
    checkMeasure(
      issue,
      [
        ['blankLengthMm', issue.blankLengthMm],
        ['blankWidthMm', issue.blankWidthMm],
      ],
      context,
    ),
  );
export type MaterialIssueInput = z.input<typeof materialIssueInputSchema>;

/** An issue to a job or a return from it. Money is absent for those without `materials.money`. */
export const materialIssueSchema = z.object({
  issueId: idSchema,
  jobId: idSchema,
  materialId: idSchema,
  material: z.string(),
  kind: z.enum(ISSUE_KINDS),
  issuedOn: localDateSchema,
  sheets: z.number().int().nullable(),
  pieces: z.number().int().nullable(),
  blankLengthMm: quantitySchema.nullable(),
  blankWidthMm: quantitySchema.nullable(),
  /** Above 0 for a return too. */
  weightKg: weightSchema,
  /** At which it was valued; null if voided. */
  averagePerKg: rateSchema.nullable().optional(),
  /** As the job bears it: below 0 for a return; null if voided. */
  amount: moneySchema.nullable().optional(),
  note: z.string().nullable(),
  voidedAt: instantSchema.nullable(),
  voidedBy: z.string().nullable(),
});
export type MaterialIssue = z.infer<typeof materialIssueSchema>;

export const STOCK_MOVE_KINDS = ['lot', 'issue', 'return'] as const;
export type StockMoveKind = (typeof STOCK_MOVE_KINDS)[number];

/** A move of a material's stock with the stock after it, signed as stock moves. No money without `materials.money`. */
export const stockMoveSchema = z.object({
  moveId: idSchema,
  kind: z.enum(STOCK_MOVE_KINDS),
  movedOn: localDateSchema,
  /** Of a lot. */
  lot: z
    .object({
      number: z.string(),
      vendor: z.string(),
      cost: moneySchema.optional(),
      freight: moneySchema.optional(),
    })
    .nullable(),
  /** Of an issue or a return. */
  job: z.object({ jobId: idSchema, number: z.string(), title: z.string() }).nullable(),
  sheets: z.number().int().nullable(),
  pieces: z.number().int().nullable(),
  lengthMm: quantitySchema.nullable(),
  widthMm: quantitySchema.nullable(),
  weightKg: weightSchema,
  amount: moneySchema.nullable().optional(),
  /** At which an issue or return was valued; after it for a lot. */
  averagePerKg: rateSchema.nullable().optional(),
  balanceKg: weightSchema.nullable(),
  balanceAmount: moneySchema.nullable().optional(),
  note: z.string().nullable(),
  voidedAt: instantSchema.nullable(),
  voidedBy: z.string().nullable(),
});
export type StockMove = z.infer<typeof stockMoveSchema>;
export const stockMoveQuerySchema = pageQuerySchema.extend({
  /** `voided` lists what no longer counts, and has no balance. */
  show: z.enum(['all', ...STOCK_MOVE_KINDS, 'voided']).default('all'),
});
export type StockMoveQuery = z.infer<typeof stockMoveQuerySchema>;
export const stockMovePageSchema = z.object({
  items: z.array(stockMoveSchema),
  nextCursor: z.string().nullable(),
});
export type StockMovePage = z.infer<typeof stockMovePageSchema>;

const materialId = z.object({ materialId: idSchema });
const lotId = z.object({ lotId: idSchema });
const issueId = z.object({ issueId: idSchema });
export const materialEndpoints = {
  listMaterials: endpoint({
    method: 'get',
    path: '/materials',
    summary: 'Materials with their stock',
    permission: 'materials.view',
    response: z.array(materialSchema),
  }),
  getMaterial: endpoint({
    method: 'get',
    path: '/materials/:materialId',
    summary: 'A material with its stock',
    permission: 'materials.view',
    params: materialId,
    response: materialSchema,
  }),
  createMaterial: endpoint({
    method: 'post',
    path: '/materials',
    summary: 'Add a material',
    permission: 'materials.edit',
    body: materialInputSchema,
    response: materialSchema,
  }),
  updateMaterial: endpoint({
    method: 'patch',
    path: '/materials/:materialId',
    summary: 'Change a material; weights already in the books stay',
    permission: 'materials.edit',
    params: materialId,
    body: materialInputSchema,
    response: materialSchema,
  }),
  listStockMoves: endpoint({
    method: 'get',
    path: '/materials/:materialId/moves',
    summary: 'A page of a material’s stock ledger, latest first',
    permission: 'materials.view',
    params: materialId,
    query: stockMoveQuerySchema,
    response: stockMovePageSchema,
  }),
  createSheetLot: endpoint({
    method: 'post',
    path: '/materials/:materialId/lots',
    summary: 'Receive a lot',
    permission: 'materials.edit',
    params: materialId,
    body: sheetLotInputSchema,
    response: sheetLotSchema,
  }),
  updateSheetLot: endpoint({
    method: 'patch',
    path: '/sheet-lots/:lotId',
    summary: 'Correct a lot: it is voided and another takes its place',
    permission: 'materials.edit',
    params: lotId,
    body: sheetLotInputSchema,
    response: sheetLotSchema,
  }),
  voidSheetLot: endpoint({
    method: 'post',
    path: '/sheet-lots/:lotId/void',
    summary: 'Void a lot, if the stock still covers all issues',
    permission: 'materials.edit',
    params: lotId,
    response: null,
  }),
  restoreSheetLot: endpoint({
    method: 'post',
    path: '/sheet-lots/:lotId/restore',
    summary: 'Take back the voiding of a lot',
    permission: 'materials.edit',
    params: lotId,
    response: null,
  }),
  createMaterialIssue: endpoint({
    method: 'post',
    path: '/material-issues',
    summary: 'Issue material to a job, or take it back',
    permission: 'materials.edit',
    body: materialIssueInputSchema,
    response: materialIssueSchema,
  }),
  updateMaterialIssue: endpoint({
    method: 'patch',
    path: '/material-issues/:issueId',
    summary: 'Correct an issue or a return: it is voided and another takes its place',
    permission: 'materials.edit',
    params: issueId,
    body: materialIssueInputSchema,
    response: materialIssueSchema,
  }),
  voidMaterialIssue: endpoint({
    method: 'post',
    path: '/material-issues/:issueId/void',
    summary: 'Void an issue or a return',
    permission: 'materials.edit',
    params: issueId,
    response: null,
  }),
  restoreMaterialIssue: endpoint({
    method: 'post',
    path: '/material-issues/:issueId/restore',
    summary: 'Take back the voiding of an issue or a return',
    permission: 'materials.edit',
    params: issueId,
    response: null,
  }),
};
