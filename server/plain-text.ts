/** PostgreSQL keeps neither U+0000 nor half a surrogate pair; text that carries them loses just those. */
export function plainText(text: string): string {
  return text
    .replaceAll('\0', '')
    .replace(/[\uD800-\uDBFF](?![\uDC00-\uDFFF])|(?<![\uD800-\uDBFF])[\uDC00-\uDFFF]/g, '\uFFFD');
}

/** The same for every string inside plain data; for JSON.parse and JSON.stringify. */
export function plainStrings(_key: string, value: unknown): unknown {
  return typeof value === 'string' ? plainText(value) : value;
}
