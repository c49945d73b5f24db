const ENTITIES: Readonly<Record<string, string>> = { lt: '<', gt: '>', amp: '&', quot: '"', apos: "'" };
const ENTITY = /&(?:#x([0-9a-f]+)|#(\d+)|(lt|gt|amp|quot|apos));/gi;
const ATTRIBUTE = /([\w:.-]+)\s*=\s*(?:"([^"]*)"|'([^']*)')/g;

/** Replaces XML's character references by the characters they stand for. */
export function decodeXmlText(text: string): string {
  return text.replace(ENTITY, (_, hex?: string, decimal?: string, name?: string) => {
    if (name) return ENTITIES[name.toLowerCase()] ?? '';
    return String.fromCodePoint(hex ? Number.parseInt(hex, 16) : Number(decimal));
  });
}

/** Writes text so that it can stand between the quotes of an attribute. */
export function encodeXmlAttribute(text: string): string {
  return text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('"', '&quot;');
}

/** The attributes of a start tag by local name (without prefix). */
export function parseXmlAttributes(text: string): Readonly<Record<string, string>> {
  const attributes: Record<string, string> = {};
  for (const [, name = '', double, single] of text.matchAll(ATTRIBUTE)) {
    attributes[name.slice(name.indexOf(':') + 1)] = decodeXmlText(double ?? single ?? '');
  }
  return attributes;
}

/** The attributes of every start tag named `name`, in document order. The XML must be free of prefixes. */
export function findXmlTags(xml: string, name: string): Readonly<Record<string, string>>[] {
  const tags = xml.matchAll(new RegExp(`<${name}(\\s[^>]*?)?/?>`, 'g'));
  return [...tags].map(([, attributes = '']) => parseXmlAttributes(attributes));
}

/** Whether an on/off attribute says on. */
export function isXmlTrue(value: string | undefined): boolean {
  return value === '1' || value === 'true' || value === 'on';
}

/**
 * Takes the namespace prefix off all tags when the root element carries one. Some programs write `<x:row>` for
 * `<row>`, which means the same.
 */
export function dropRootPrefix(xml: string): string {
  const prefix = /<([A-Za-z_][\w.-]*):(?:workbook|worksheet|styleSheet|sst|Relationships)[\s>]/.exec(
    xml.slice(0, 4_096),
  )?.[1];
  return prefix ? xml.replaceAll(`<${prefix}:`, '<').replaceAll(`</${prefix}:`, '</') : xml;
}
