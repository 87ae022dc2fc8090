const ENTITIES: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
  '`': '&#96;',
};

/** Words between tags: no element, entity or comment can begin in them. */
export function htmlText(text: string): string {
  return text.replace(/[&<>"'`]/g, (sign) => ENTITIES[sign]!);
}

/**
 * A complete attribute, ` name="value"` without the blank before it.
 *
 * Always quoted, for an unquoted value ends at the first blank; line ends are written as references,
 * for a parser may normalise them.
 * @throws RangeError when the name is not a plain attribute name or would run script
 */
export function htmlAttribute(name: string, value: string): string {
  if (!/^[a-z][a-z0-9-]*$/i.test(name) || /^on/i.test(name)) {
    throw new RangeError(`not an attribute name for data: ${name}`);
  }
  const escaped = htmlText(value).replace(/[\t\r\n]/g, (sign) => `&#${sign.charCodeAt(0)};`);
  return `${name}="${escaped}"`;
}
