import { addressCells, scanSheetXml } from './sheet-xml';
import { listCoveredCells } from './merged-cells';
import { columnLetters, columnNumber, columnOf, rowOf } from './cell-address';
import {
  decodeXmlText,
  dropRootPrefix,
  encodeXmlAttribute,
  findXmlTags,
  parseXmlAttributes,
} from './xml-tags';

describe('looking through the XML of a sheet', () => {
  it('notes formulas and ISO dates with their stored value, and sizes', () => {
    const xml =
      '<worksheet><cols><col min="1" max="2"/></cols><sheetData>' +
      '<row r="1"><c r="A1" t="s"><v>0</v></c><c r="B1" s="2"/></row>' +
      '<row r="3"><c r="A3"><f>1+1</f><v>2</v></c><c t="str" r="B3"><f>""</f><v></v></c>' +
      '<c r=\'C3\'><f/></c><c r=\'D3\' t=\'d\'><v>2026-03-02</v></c><c r="E3" t="str"><f>"&lt;"</f><v>&lt;</v></c></row>' +
      '</sheetData><mergeCells count="1"><mergeCell ref="A1:B2"/></mergeCells></worksheet>';
    const scan = scanSheetXml(xml);
    expect(Object.fromEntries(scan.stored)).toEqual({
      A3: { type: 'n', value: '2', isFormula: true },
      B3: { type: 'str', value: '', isFormula: true },
      C3: { type: 'n', value: null, isFormula: true },
      D3: { type: 'd', value: '2026-03-02', isFormula: false },
      E3: { type: 'str', value: '<', isFormula: true },
    });
    expect(scan).toMatchObject({ merges: ['A1:B2'], cells: 7, rowsFilled: 2 });
  });

  it('gives cells the address that follows from their place', () => {
    expect(addressCells('<row><c><v>1</v></c><c r="D1"/><c/></row><row r="5"><c/></row><row/>')).toBe(
      '<row r="1"><c r="A1"><v>1</v></c><c r="D1"/><c r="E1"/></row><row r="5"><c r="A5"/></row><row r="6"/>',
    );
    const whole = '<row r="1" spans="1:2"><c r="A1"/></row>';
    expect(addressCells(whole)).toBe(whole);
  });
});

describe('merged cells', () => {
  const isCovered = listCoveredCells(['B2:C4', 'E1:E2', 'A10:Z10']);

  it.each(['C2', 'B3', 'C4', 'E2', 'B10', 'Z10'])('%s is covered', (address) => {
    expect(isCovered(address)).toBe(true);
  });

  it.each(['B2', 'A2', 'D3', 'B5', 'E1', 'E3', 'A10', 'AA10', 'A1'])('%s is not', (address) => {
    expect(isCovered(address)).toBe(false);
  });
});

describe('addresses', () => {
  it.each([
    [1, 'A'],
    [26, 'Z'],
    [27, 'AA'],
    [702, 'ZZ'],
    [703, 'AAA'],
    [16_384, 'XFD'],
  ])('column %i is %s', (column, letters) => {
    expect(columnLetters(column)).toBe(letters);
    expect(columnNumber(`${letters}7`)).toBe(column);
  });

  it('come apart into column and row', () => {
    expect([columnOf('AB12'), rowOf('AB12')]).toEqual(['AB', 12]);
  });
});

describe('XML texts and tags', () => {
  it('decodes references and encodes attributes', () => {
    expect(decodeXmlText('a &lt; b &amp;amp; &#228;&#xE9; &quot;&apos;')).toBe('a < b &amp; äé "\'');
    expect(encodeXmlAttribute('"a" & <b>')).toBe('&quot;a&quot; &amp; &lt;b>');
  });

  it('finds tags with attributes in any order, quotes and prefix', () => {
    expect(findXmlTags(`<sheets><sheet r:id='rId1' name="A &amp; B"/></sheets>`, 'sheet')).toEqual([
      { id: 'rId1', name: 'A & B' },
    ]);
    expect(parseXmlAttributes(' t = "s" ')).toEqual({ t: 's' });
  });

  it('takes the prefix off all tags of a part', () => {
    expect(dropRootPrefix('<x:worksheet xmlns:x="u"><x:row r="1"></x:row></x:worksheet>')).toBe(
      '<worksheet xmlns:x="u"><row r="1"></row></worksheet>',
    );
    expect(dropRootPrefix('<worksheet><a:b/></worksheet>')).toBe('<worksheet><a:b/></worksheet>');
  });
});
