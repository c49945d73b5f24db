import {
  AppError,
  type Issue,
  trialBendInputSchema,
  type trialBendPasteSchema,
  type TrialBendPasteResult,
} from '@brakeven/contract';
import { type z } from 'zod';
import { inShopOf, type ShopContext } from '../context';
import { readSetupTools } from '../manage-tooling/setup-tools';
import {
  getFormingMaterial,
  readFormingMaterials,
  readShopGauges,
  toGaugeFinder,
} from '../manage-tooling/shop-materials';
import { type PastedBend, readPastedBends } from './pasted-bends';
import { addTrialBends, checkBend, refuseIssues, type TrialBendValues } from './trial-bends';

type PasteValues = z.output<typeof trialBendPasteSchema>;

/**
 * Notes trial bends of one set-up that were copied from a sheet, all of them or none.
 * @throws AppError `invalid_input` naming line and cell; as `createTrialBend`
 */
export function pasteTrialBends(context: ShopContext, body: PasteValues): Promise<TrialBendPasteResult> {
  return inShopOf(context, async (trx) => {
    const tools = await readSetupTools(trx, body);
    const materials = await readFormingMaterials(trx);
    const material = getFormingMaterial(materials, body.materialCode);
    const findGauge = toGaugeFinder(await readShopGauges(trx));
    const table = readPastedBends(body.text, { system: material.gaugeSystem, findGauge });
    refuseIssues(table.issues);
    const read = table.bends.map((bend) => readBend(body, bend));
    refuseIssues(read.flatMap(({ issues }) => issues));
    const bends = read.flatMap(({ bend }) => bend ?? []);
    const found = bends.flatMap((bend, index) =>
      onLine(table.bends[index]?.line ?? 0, checkBend(context, { tools, material }, bend)),
    );
    refuseIssues(found);
    return {
      items: await addTrialBends(context, trx, bends, materials),
      columnsIgnored: table.columnsIgnored,
    };
  });
}

function readBend(
  { machineId, punchId, dieOpeningId, materialCode, thicknessMm }: PasteValues,
  pasted: PastedBend,
): { bend: TrialBendValues | null; issues: Issue[] } {
  const thickness = pasted.thicknessMm ?? thicknessMm;
  if (thickness === null) {
    const message =
      'The table has no thickness. Add a column such as Thickness (mm), or say the thickness of all rows.';
    throw new AppError('invalid_input', message, {
      issues: [{ field: 'thicknessMm', code: 'required', message }],
    });
  }
  const parsed = trialBendInputSchema.safeParse({
    machineId,
    punchId,
    dieOpeningId,
    materialCode,
    thicknessMm: thickness,
    stripWidthMm: pasted.stripWidthMm,
    depthMm: pasted.depthMm,
    measuredAngle: pasted.measuredAngle,
    isFullLength: pasted.isFullLength,
    bentBy: pasted.bentBy ?? undefined,
    bentOn: pasted.bentOn ?? undefined,
  });
  if (parsed.success) return { bend: parsed.data, issues: [] };
  const issues = parsed.error.issues.map(({ path, message }) => ({
    field: path.join('.'),
    code: 'out_of_range',
    message,
  }));
  return { bend: null, issues: onLine(pasted.line, issues) };
}

/** The same issues, told of the pasted text. */
function onLine(line: number, issues: readonly Issue[]): Issue[] {
  return issues.map(({ code, message }) => ({ field: 'text', code, message: `Line ${line}: ${message}` }));
}
