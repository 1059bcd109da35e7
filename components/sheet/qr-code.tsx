import { create } from 'qrcode';

/** Quiet modules round the code: ISO/IEC 18004 wants four. */
const QUIET = 4;

/** A QR code of a text, drawn here as one path: nothing of it is asked of any service. Black on white in every theme. */
export function QrCode({ text, label }: { text: string; label: string }) {
  const { modules } = create(text, { errorCorrectionLevel: 'M' });
  const { size } = modules;
  const side = size + 2 * QUIET;
  const dark: string[] = [];
  for (let row = 0; row < size; row += 1)
    for (let column = 0; column < size; column += 1)
      if (modules.get(row, column) === 1) dark.push(`M${column + QUIET} ${row + QUIET}h1v1h-1z`);
  return (
    <svg
      role="img"
      aria-label={label}
      data-qr={text}
      viewBox={`0 0 ${side} ${side}`}
      shapeRendering="crispEdges"
      className="size-28 shrink-0 print:size-[30mm]"
    >
      <path d={`M0 0h${side}v${side}H0z`} fill="#fff" />
      <path d={dark.join('')} fill="#000" />
    </svg>
  );
}
