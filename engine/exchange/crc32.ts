const TABLE = Uint32Array.from({ length: 256 }, (_, byte) => {
  let value = byte;
  for (let bit = 0; bit < 8; bit += 1) value = (value & 1) === 1 ? (value >>> 1) ^ 0xedb88320 : value >>> 1;
  return value >>> 0;
});

/** The check sum of zip files; `before` is that of what came before. @see ITU-T V.42 */
export function crc32(bytes: Uint8Array, before = 0): number {
  let value = ~before >>> 0;
  for (const byte of bytes) value = (value >>> 8) ^ TABLE[(value ^ byte) & 0xff]!;
  return ~value >>> 0;
}
