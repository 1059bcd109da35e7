import { qrPath } from './qr-path';

/** A text to be read by a camera: dark on light in every scheme, since many readers know no other way round. */
export function QrCode({
  text,
  label,
  isOnPaper = false,
}: {
  text: string;
  label: string;
  isOnPaper?: boolean;
}) {
  const { size, path } = qrPath(text);
  return (
    <svg
      role="img"
      aria-label={label}
      viewBox={`0 0 ${size} ${size}`}
      shapeRendering="crispEdges"
      className={isOnPaper ? 'size-28 shrink-0 print:size-[30mm]' : 'w-full max-w-60 rounded-md'}
    >
      <rect width={size} height={size} fill="#fff" />
      <path d={path} fill="#000" />
    </svg>
  );
}
