import { decodeEscapedText, encodeEscapedText } from './escaped-text';

it('decodes characters that a workbook escapes', () => {
  expect(decodeEscapedText('a_x000D_b _x0041_')).toBe('a\rb A');
  expect(decodeEscapedText('_x005F_x0041_')).toBe('_x0041_');
  expect(decodeEscapedText('_x41_ x0041_')).toBe('_x41_ x0041_');
});

it.each(['plain', '_x0041_', '_x0041_x0042_', '__x000d__', 'x0041_'])('%p comes back as it was', (text) => {
  expect(decodeEscapedText(encodeEscapedText(text))).toBe(text);
});
