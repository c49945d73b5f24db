/**
 * Text as PostgreSQL can keep it: a workbook may hold the character 0 and halves of character pairs, a database
 * text may not. Each becomes the replacement character, so that nothing disappears unseen.
 */
export function toStorableText(text: string): string {
  return text.replaceAll('\0', '\uFFFD').replace(/\p{Surrogate}/gu, '\uFFFD');
}

/** A value as JSON that PostgreSQL can keep. */
export function toStorableJson(value: unknown): string {
  return JSON.stringify(value, (_key, part: unknown) =>
    typeof part === 'string' ? toStorableText(part) : part,
  );
}
