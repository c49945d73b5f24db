import { posix } from 'node:path';
import { builtInNumberFormat, type NumberFormat, parseNumberFormat } from './number-format';
import { addressCells } from './sheet-xml';
import { type ZipParts } from './unpack-zip';
import { toNotWorkbookError } from './workbook-error';
import { dropRootPrefix, findXmlTags, isXmlTrue } from './xml-tags';

/** A sheet of a workbook before its cells are read. */
export interface PackedSheet {
  readonly name: string;
  readonly isHidden: boolean;
  /** The sheet's XML without prefixes, every cell with its address. */
  readonly xml: string;
}

/** The parts of a workbook that matter for reading cells, in one plain form whatever program wrote them. */
export interface WorkbookPackage {
  readonly date1904: boolean;
  readonly sheets: readonly PackedSheet[];
  /** Number formats by style index. */
  readonly formats: readonly NumberFormat[];
  readonly sharedStringsXml: string | null;
}

interface Relationship {
  readonly id: string;
  readonly type: string;
  readonly part: string;
}

const WORKBOOK_PARTS = /^(_rels\/|xl\/(?!media\/|drawings\/|embeddings\/|printerSettings\/)).*\.(xml|rels)$/i;

/** Whether a part of the zip file can matter for reading cells. */
export function isWorkbookPart(name: string): boolean {
  return WORKBOOK_PARTS.test(name) && !/(theme|comments|calcChain|vmlDrawing|pivot)[^/]*$/i.test(name);
}

/**
 * Finds sheets, styles and shared strings through the package's relationships.
 * @throws WorkbookError `file_not_workbook` when there is no workbook inside
 */
export function openWorkbookPackage(parts: ZipParts): WorkbookPackage {
  const workbookPart =
    listRelationships(parts, '').find(({ type }) => type.endsWith('/officeDocument'))?.part ??
    'xl/workbook.xml';
  const workbookXml = findPart(parts, workbookPart);
  if (!workbookXml || !/<workbook[\s>]/.test(workbookXml)) throw toNotWorkbookError();
  const relationships = listRelationships(parts, workbookPart);
  const partOf = (kind: string) => {
    const found = relationships.find(({ type }) => type.endsWith(`/${kind}`));
    return found ? findPart(parts, found.part) : null;
  };
  return {
    date1904: findXmlTags(workbookXml, 'workbookPr').some(({ date1904 }) => isXmlTrue(date1904)),
    sheets: openSheets(parts, workbookXml, relationships),
    formats: listCellFormats(partOf('styles') ?? ''),
    sharedStringsXml: partOf('sharedStrings'),
  };
}

function openSheets(
  parts: ZipParts,
  workbookXml: string,
  relationships: readonly Relationship[],
): PackedSheet[] {
  return findXmlTags(workbookXml, 'sheet').flatMap(({ name = '', state, id }) => {
    const found = relationships.find((one) => one.id === id && one.type.endsWith('/worksheet'));
    const xml = found && findPart(parts, found.part);
    if (!xml) return [];
    return [{ name, isHidden: state === 'hidden' || state === 'veryHidden', xml: addressCells(xml) }];
  });
}

function listRelationships(parts: ZipParts, part: string): Relationship[] {
  const folder = posix.dirname(part);
  const xml = findPart(parts, posix.join(folder, '_rels', `${posix.basename(part)}.rels`));
  if (!xml) return [];
  return findXmlTags(xml, 'Relationship').map(({ Id = '', Type = '', Target = '' }) => ({
    id: Id,
    type: Type,
    part: Target.startsWith('/') ? Target.slice(1) : posix.join(folder, Target.trim()),
  }));
}

/** Part names are compared without regard to case, as the packaging rules ask (ECMA-376 part 2, 6.2.2). */
function findPart(parts: ZipParts, name: string): string | null {
  const exact = parts.get(name);
  const content = exact ?? [...parts].find(([key]) => key.toLowerCase() === name.toLowerCase())?.[1];
  return content ? dropRootPrefix(content.toString('utf8').replace(/^\uFEFF/, '')) : null;
}

/** The number format of each style that a cell can name. */
function listCellFormats(stylesXml: string): NumberFormat[] {
  const own = new Map(
    findXmlTags(stylesXml, 'numFmt').map(({ numFmtId, formatCode = '' }) => [
      Number(numFmtId),
      parseNumberFormat(formatCode),
    ]),
  );
  const cellStyles = /<cellXfs[\s>].*?<\/cellXfs>/s.exec(stylesXml)?.[0] ?? '';
  return findXmlTags(cellStyles, 'xf').map(({ numFmtId }) => {
    const id = Number(numFmtId ?? 0);
    return own.get(id) ?? builtInNumberFormat(id);
  });
}
