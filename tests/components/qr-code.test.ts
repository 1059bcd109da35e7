import jsQR from 'jsqr';
import { expect, it } from 'vitest';
import { qrPath } from '@/components/ui/qr-path';

const SCALE = 4;

/** The code as a camera sees it: RGBA, dark where the path is. */
function picture({ size, path }: { size: number; path: string }) {
  const side = size * SCALE;
  const pixels = new Uint8ClampedArray(side * side * 4).fill(255);
  for (const [, x = '', y = ''] of path.matchAll(/M(\d+) (\d+)h1v1h-1z/g)) {
    for (let row = 0; row < SCALE; row += 1) {
      for (let column = 0; column < SCALE; column += 1) {
        const at = ((Number(y) * SCALE + row) * side + Number(x) * SCALE + column) * 4;
        pixels.fill(0, at, at + 3);
      }
    }
  }
  return { pixels, side };
}

// read back by another program than the one that drew it
it.each([
  'mw_0123456789abcdefghijklmnopqrstuvwxyzABCDEF',
  '{"server":"wss://greenhouse.example","node":"LH-1","token":"mw_ümlaut"}',
])('a camera reads %s as it was given', (text) => {
  const { pixels, side } = picture(qrPath(text));
  expect(jsQR(pixels, side, side)?.data).toBe(text);
});

it('is surrounded by four light modules', () => {
  const { size, path } = qrPath('LH-1');
  const places = [...path.matchAll(/M(\d+) (\d+)/g)].flatMap(([, x, y]) => [Number(x), Number(y)]);
  expect([Math.min(...places), Math.max(...places)]).toEqual([4, size - 5]);
});
