import { packStoredZip } from '../src/lib/pack-stored-zip';

const OFFICE = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';

/** The smallest .xlsx around the XML of one sheet's rows, for sizes and forms that no program would write. */
export function packRawXlsx(sheetData: string, { styles = '' }: { styles?: string } = {}): Uint8Array {
  const parts: Record<string, string> = {
    '_rels/.rels': relationship('rId1', 'officeDocument', 'xl/workbook.xml'),
    'xl/workbook.xml': `<workbook xmlns:r="${OFFICE}"><sheets><sheet name="Raw" sheetId="1" r:id="rId1"/></sheets></workbook>`,
    'xl/_rels/workbook.xml.rels': relationship('rId1', 'worksheet', 'worksheets/sheet1.xml').replace(
      '</Relationships>',
      `<Relationship Id="rId2" Type="${OFFICE}/styles" Target="styles.xml"/></Relationships>`,
    ),
    'xl/styles.xml': `<styleSheet>${styles}</styleSheet>`,
    'xl/worksheets/sheet1.xml': `<worksheet><sheetData>${sheetData}</sheetData></worksheet>`,
  };
  return packStoredZip(new Map(Object.entries(parts).map(([name, xml]) => [name, Buffer.from(xml)])));
}

function relationship(id: string, type: string, target: string): string {
  return `<Relationships><Relationship Id="${id}" Type="${OFFICE}/${type}" Target="${target}"/></Relationships>`;
}
