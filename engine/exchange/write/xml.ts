/** What XML 1.0 does not allow in any document (W3C, Extensible Markup Language 1.0, 2.2), and halves of characters. */
const ILLEGAL = /[\u0000-\u0008\u000B\u000C\u000E-\u001F\uFFFE\uFFFF]|[\uD800-\uDBFF](?![\uDC00-\uDFFF])|(?<![\uD800-\uDBFF])[\uDC00-\uDFFF]/g;

/** Text and attribute values as XML takes them; what it takes in no form becomes U+FFFD. */
export const escapeXml = (text: string): string =>
  text.replace(ILLEGAL, '\uFFFD').replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;').replaceAll('"', '&quot;').replaceAll("'", '&apos;');

type Attributes = Readonly<Record<string, string | number | undefined>>;

const written = (attributes: Attributes): string =>
  Object.entries(attributes)
    .filter(([, value]) => value !== undefined)
    .map(([name, value]) => ` ${name}="${escapeXml(String(value))}"`)
    .join('');

/** An element with elements inside, already written. */
export const element = (name: string, attributes: Attributes, ...inner: readonly string[]): string => {
  const content = inner.join('');
  return content === '' ? `<${name}${written(attributes)}/>` : `<${name}${written(attributes)}>${content}</${name}>`;
};

/** An element that holds text. */
export const textElement = (name: string, text: string | number | bigint, attributes: Attributes = {}): string => `<${name}${written(attributes)}>${escapeXml(String(text))}</${name}>`;
