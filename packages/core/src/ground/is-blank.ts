/** Whether a UTF-16 code is white space that separates or pads: ASCII, no-break, typographic spaces, byte order mark. */
export function isBlank(code: number): boolean {
  if (code < 0x80) return code <= 32 || code === 0x7f;
  return (
    code === 0xa0 ||
    (code >= 0x2000 && code <= 0x200b) ||
    code === 0x2028 ||
    code === 0x2029 ||
    code === 0x202f ||
    code === 0x205f ||
    code === 0x3000 ||
    code === 0xfeff
  );
}
