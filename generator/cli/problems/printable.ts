// biome-ignore lint/suspicious/noControlCharactersInRegex: they are what must not reach a terminal
const unprintable = /[\u0000-\u001f\u007f-\u009f\u2028\u2029\u200e\u200f\u202a-\u202e\u2066-\u2069]|\p{Cs}/gu;

/** Text of the user's, or of a file's, without anything that moves a cursor or turns the line round. */
export function printable(text: string): string {
  return text.replace(unprintable, (sign) => `\\u${sign.charCodeAt(0).toString(16).padStart(4, '0')}`);
}
