/** Text of an exported file: byte-order marks are obeyed, else UTF-8 where it is valid, else Windows-1252. */
export function decodeText(bytes: Uint8Array): string {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return new TextDecoder("utf-16le").decode(bytes);
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return new TextDecoder("utf-16be").decode(bytes);
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(bytes);
  } catch {
    return windows1252(bytes);
  }
}

/** Characters of the bytes 0x80 to 0x9f in Windows-1252 (index of the WHATWG Encoding Standard); unused bytes stay controls. */
const HIGH = "€\u0081‚ƒ„…†‡ˆ‰Š‹Œ\u008dŽ\u008f\u0090‘’“”•–—˜™š›œ\u009džŸ";

/** Node 20's own decoder leaves these bytes as control characters, browsers do not: both are given the same letters here. */
function windows1252(bytes: Uint8Array): string {
  const text = new TextDecoder("windows-1252").decode(bytes);
  return text.replace(/[\u0080-\u009f]/g, (control) => HIGH[control.charCodeAt(0) - 0x80] ?? control);
}
