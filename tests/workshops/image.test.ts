import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readImage } from '@/lib/workshops/image';

const SIGNATURE = Buffer.from('89504e470d0a1a0a', 'hex');

function chunk(type: string, data: Buffer): Buffer {
  const length = Buffer.alloc(4);
  length.writeUInt32BE(data.length);
  return Buffer.concat([length, Buffer.from(type, 'latin1'), data, Buffer.alloc(4)]);
}

function png(width: number, height: number): Buffer {
  const head = Buffer.alloc(13);
  head.writeUInt32BE(width, 0);
  head.writeUInt32BE(height, 4);
  head.set([8, 2, 0, 0, 0], 8);
  return Buffer.concat([
    SIGNATURE,
    chunk('IHDR', head),
    chunk('tEXt', Buffer.from('Title\0Yard')),
    chunk('IDAT', Buffer.from([1, 2, 3])),
    chunk('IEND', Buffer.alloc(0)),
  ]);
}

function segment(marker: number, data: Buffer): Buffer {
  const head = Buffer.from([0xff, marker, 0, 0]);
  head.writeUInt16BE(data.length + 2, 2);
  return Buffer.concat([head, data]);
}

function jpeg(width: number, height: number, frame = 0xc0): Buffer {
  const size = Buffer.from([8, 0, 0, 0, 0, 1, 1, 0x11, 0]);
  size.writeUInt16BE(height, 1);
  size.writeUInt16BE(width, 3);
  return Buffer.concat([
    Buffer.from([0xff, 0xd8]),
    segment(0xe0, Buffer.from('JFIF\0')),
    segment(frame, size),
    segment(0xda, Buffer.from([1, 1, 0, 0, 63, 0])),
    Buffer.from([0x12, 0x34, 0xff, 0xd9]),
  ]);
}

function webp(kind: string, body: Buffer): Buffer {
  const head = Buffer.alloc(20);
  head.write('RIFF', 0, 'latin1');
  head.writeUInt32LE(12 + body.length, 4);
  head.write(`WEBP${kind}`, 8, 'latin1');
  head.writeUInt32LE(body.length, 16);
  return Buffer.concat([head, body]);
}

function extended(width: number, height: number): Buffer {
  const body = Buffer.alloc(10);
  body.writeUIntLE(width - 1, 4, 3);
  body.writeUIntLE(height - 1, 7, 3);
  return webp('VP8X', body);
}

function lossless(width: number, height: number): Buffer {
  const body = Buffer.alloc(10);
  body[0] = 0x2f;
  body.writeUInt32LE((width - 1) | ((height - 1) << 14), 1);
  return webp('VP8L', body);
}

function lossy(width: number, height: number): Buffer {
  const body = Buffer.alloc(10);
  body.set([0x9d, 0x01, 0x2a], 3);
  body.writeUInt16LE(width, 6);
  body.writeUInt16LE(height, 8);
  return webp('VP8 ', body);
}

const side = fc.integer({ min: 1, max: 16_383 });
const makers = { png, jpeg, extended, lossless, lossy };
const types = {
  png: 'image/png',
  jpeg: 'image/jpeg',
  extended: 'image/webp',
  lossless: 'image/webp',
  lossy: 'image/webp',
};
const kind = fc.constantFrom(...(Object.keys(makers) as (keyof typeof makers)[]));

describe('a picture', () => {
  it('is told by its bytes: kind, width and height', () => {
    fc.assert(
      fc.property(kind, side, side, (name, width, height) => {
        const mediaType = types[name];
        expect(readImage(makers[name](width, height))).toEqual({ mediaType, width, height });
      }),
    );
  });

  it('is none when it is cut short, or goes on after its end', () => {
    fc.assert(
      fc.property(kind, fc.integer({ min: 1, max: 20 }), (name, count) => {
        const whole = makers[name](300, 200);
        expect(readImage(whole.subarray(0, whole.length - count))).toBeNull();
        expect(readImage(Buffer.concat([whole, Buffer.alloc(count, 0x3c)]))).toBeNull();
      }),
    );
  });

  it('is not made of anything else, whatever its first bytes say', () => {
    const script = Buffer.from('<svg xmlns="http://www.w3.org/2000/svg"><script>1</script></svg>');
    for (const bytes of [
      Buffer.alloc(0),
      script,
      Buffer.from('GIF89a\x01\x00\x01\x00', 'latin1'),
      Buffer.concat([SIGNATURE, script]),
      Buffer.concat([Buffer.from([0xff, 0xd8]), script, Buffer.from([0xff, 0xd9])]),
      webp('HTML', script),
    ]) {
      expect(readImage(bytes)).toBeNull();
    }
    fc.assert(
      fc.property(fc.uint8Array({ maxLength: 300 }), (bytes) => {
        expect(readImage(Buffer.concat([SIGNATURE, bytes]))).toBeNull();
      }),
    );
  });

  it('in JPEG may be progressive, but no frame that browsers do not draw', () => {
    expect(readImage(jpeg(30, 20, 0xc2))).toMatchObject({ width: 30, height: 20 });
    expect(readImage(jpeg(30, 20, 0xc3))).toBeNull();
  });
});
