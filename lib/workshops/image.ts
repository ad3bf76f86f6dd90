/** Limits of an uploaded picture. */
export const IMAGE_LIMITS = {
  bytes: 256 * 1024,
  /** Pixels along either side. */
  side: 2_000,
} as const;

export interface ImageFacts {
  mediaType: 'image/png' | 'image/jpeg' | 'image/webp';
  width: number;
  height: number;
}

/**
 * What a picture is, read from its bytes: kind and size. The whole file is walked, so that text or a
 * program with a picture's first bytes is not taken for one. Null for everything else.
 *
 * Sources: W3C Portable Network Graphics (chunk layout, IHDR); ITU-T T.81 annex B (markers and
 * frame header); RFC 9649 (WebP container, VP8, VP8L and VP8X headers).
 */
export function readImage(bytes: Buffer): ImageFacts | null {
  return readPng(bytes) ?? readJpeg(bytes) ?? readWebp(bytes);
}

const PNG_SIGNATURE = Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]);

function readPng(bytes: Buffer): ImageFacts | null {
  if (!bytes.subarray(0, 8).equals(PNG_SIGNATURE)) return null;
  let size: { width: number; height: number } | null = null;
  let hasData = false;
  for (let at = 8; at + 12 <= bytes.length;) {
    const length = bytes.readUInt32BE(at);
    const type = bytes.toString('latin1', at + 4, at + 8);
    const next = at + 12 + length;
    if (next > bytes.length || (type === 'IHDR') !== (at === 8)) return null;
    if (type === 'IHDR') {
      if (length !== 13) return null;
      size = { width: bytes.readUInt32BE(at + 8), height: bytes.readUInt32BE(at + 12) };
    }
    if (type === 'IDAT') hasData = true;
    if (type === 'IEND') {
      const whole = next === bytes.length && hasData;
      return whole && size !== null ? { mediaType: 'image/png', ...size } : null;
    }
    at = next;
  }
  return null;
}

/** Frames that browsers draw: baseline, extended and progressive. */
const FRAMES = [0xc0, 0xc1, 0xc2];
const START_OF_SCAN = 0xda;

function readJpeg(bytes: Buffer): ImageFacts | null {
  if (bytes.length < 4 || bytes.readUInt16BE(0) !== 0xffd8) return null;
  if (bytes.readUInt16BE(bytes.length - 2) !== 0xffd9) return null;
  let size: { width: number; height: number } | null = null;
  for (let at = 2; at + 4 <= bytes.length;) {
    const marker = bytes[at + 1] ?? 0;
    if (bytes[at] !== 0xff || marker < 0xc0) return null;
    const length = bytes.readUInt16BE(at + 2);
    if (length < 2 || at + 2 + length > bytes.length) return null;
    if (marker === START_OF_SCAN) return size && { mediaType: 'image/jpeg', ...size };
    if (FRAMES.includes(marker)) {
      if (length < 8) return null;
      size = { height: bytes.readUInt16BE(at + 5), width: bytes.readUInt16BE(at + 7) };
    }
    at += 2 + length;
  }
  return null;
}

function readWebp(bytes: Buffer): ImageFacts | null {
  const tag = (at: number) => bytes.toString('latin1', at, at + 4);
  if (bytes.length < 30 || tag(0) !== 'RIFF' || tag(8) !== 'WEBP') return null;
  const whole = bytes.readUInt32LE(4) + 8;
  if (whole !== bytes.length) return null;
  const mediaType = 'image/webp';
  switch (tag(12)) {
    case 'VP8 ': {
      const keyFrame = bytes[23] === 0x9d && bytes[24] === 0x01 && bytes[25] === 0x2a;
      const [width, height] = [bytes.readUInt16LE(26) & 0x3fff, bytes.readUInt16LE(28) & 0x3fff];
      return keyFrame ? { mediaType, width, height } : null;
    }
    case 'VP8L': {
      const packed = bytes.readUInt32LE(21);
      const [width, height] = [(packed & 0x3fff) + 1, ((packed >>> 14) & 0x3fff) + 1];
      return bytes[20] === 0x2f ? { mediaType, width, height } : null;
    }
    case 'VP8X':
      return { mediaType, width: bytes.readUIntLE(24, 3) + 1, height: bytes.readUIntLE(27, 3) + 1 };
    default:
      return null;
  }
}
