import { encodeEscapedText } from './escaped-text';
import { type NumberFormat } from './number-format';
import { packStoredZip } from './pack-stored-zip';
import { type WorkbookPackage } from './workbook-package';
import { encodeXmlAttribute } from './xml-tags';

const MAIN = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main';
const OFFICE = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';
const PACKAGE = 'http://schemas.openxmlformats.org/package/2006/relationships';
const DECLARATION = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n';
const FIRST_OWN_FORMAT = 164;

const TAGS: Readonly<Record<NumberFormat['kind'], string>> = {
  number: '0',
  percent: '"percent"0',
  date: '"date"0',
  duration: '"duration"0',
};
const FORMATS_BY_TAG = new Map<string, NumberFormat>([
  [TAGS.percent, { kind: 'percent' }],
  [TAGS.date, { kind: 'date' }],
  [TAGS.duration, { kind: 'duration' }],
]);

/**
 * Packs a workbook again with nothing but its cells. Sheets are named `1`, `2` … in order. Dates and durations
 * keep their kind as quoted text in the number format, so that the library hands over the stored number and does
 * not turn it into a clock time; {@link findTaggedFormat} reads the kind back.
 */
export function packPlainWorkbook({ sheets, formats, sharedStringsXml }: WorkbookPackage): Buffer {
  const parts = new Map<string, string>([
    ['_rels/.rels', toRelationships([['rId1', 'officeDocument', 'xl/workbook.xml']])],
    ['xl/workbook.xml', toWorkbookXml(sheets.length)],
    ['xl/_rels/workbook.xml.rels', toWorkbookRelationships(sheets.length, sharedStringsXml !== null)],
    ['xl/styles.xml', toStylesXml(formats)],
  ]);
  // The library decodes escapes in shared texts and not in others; escaped once more, all come out as stored.
  if (sharedStringsXml !== null) parts.set('xl/sharedStrings.xml', encodeEscapedText(sharedStringsXml));
  sheets.forEach(({ xml }, index) => parts.set(`xl/worksheets/sheet${index + 1}.xml`, xml));
  return packStoredZip(new Map([...parts].map(([name, xml]) => [name, Buffer.from(xml, 'utf8')])));
}

/** The number format behind the code of a cell of a plain workbook. */
export function findTaggedFormat(code: string | undefined): NumberFormat {
  const zeros = code && /^0{2,}$/.test(code) ? code.length : 0;
  return FORMATS_BY_TAG.get(code ?? '') ?? { kind: 'number', zeros };
}

function toTag(format: NumberFormat): string {
  return format.kind === 'number' && format.zeros > 0 ? '0'.repeat(format.zeros) : TAGS[format.kind];
}

function toWorkbookXml(sheetCount: number): string {
  const sheets = countFromOne(sheetCount).map((n) => `<sheet name="${n}" sheetId="${n}" r:id="rId${n}"/>`);
  return `${DECLARATION}<workbook xmlns="${MAIN}" xmlns:r="${OFFICE}"><sheets>${sheets.join('')}</sheets></workbook>`;
}

function toWorkbookRelationships(sheetCount: number, hasStrings: boolean): string {
  const sheets = countFromOne(sheetCount).map(
    (n) => [`rId${n}`, 'worksheet', `worksheets/sheet${n}.xml`] as const,
  );
  const strings = hasStrings ? [['rIdStrings', 'sharedStrings', 'sharedStrings.xml'] as const] : [];
  return toRelationships([...sheets, ['rIdStyles', 'styles', 'styles.xml'], ...strings]);
}

function toRelationships(rows: readonly (readonly [id: string, kind: string, target: string])[]): string {
  const tags = rows.map(
    ([id, kind, target]) => `<Relationship Id="${id}" Type="${OFFICE}/${kind}" Target="${target}"/>`,
  );
  return `${DECLARATION}<Relationships xmlns="${PACKAGE}">${tags.join('')}</Relationships>`;
}

function toStylesXml(formats: readonly NumberFormat[]): string {
  const codes = formats.map(toTag);
  const known = [...new Set(codes)];
  const numFmts = known.map(
    (code, index) =>
      `<numFmt numFmtId="${FIRST_OWN_FORMAT + index}" formatCode="${encodeXmlAttribute(code)}"/>`,
  );
  const styles = codes.map((code) => `<xf numFmtId="${FIRST_OWN_FORMAT + known.indexOf(code)}" xfId="0"/>`);
  return (
    `${DECLARATION}<styleSheet xmlns="${MAIN}"><numFmts>${numFmts.join('')}</numFmts>` +
    '<fonts><font><sz val="11"/></font></fonts><fills><fill><patternFill patternType="none"/></fill></fills>' +
    `<borders><border/></borders><cellXfs>${styles.join('')}</cellXfs></styleSheet>`
  );
}

function countFromOne(count: number): number[] {
  return Array.from({ length: count }, (_, index) => index + 1);
}
