import { create } from 'qrcode';

/** Light modules that a reader needs round the code (ISO/IEC 18004: four). */
const QUIET = 4;

export interface QrPath {
  /** Modules a side, the quiet zone with it. */
  size: number;
  /** The dark modules as one path, in modules. */
  path: string;
}

/** A text as a QR code: fifteen of a hundred modules may be dirty or torn (level M). */
export function qrPath(text: string): QrPath {
  const { modules } = create(text, { errorCorrectionLevel: 'M' });
  const squares: string[] = [];
  for (let row = 0; row < modules.size; row += 1) {
    for (let column = 0; column < modules.size; column += 1) {
      if (modules.get(row, column) === 1) squares.push(`M${column + QUIET} ${row + QUIET}h1v1h-1z`);
    }
  }
  return { size: modules.size + 2 * QUIET, path: squares.join('') };
}
