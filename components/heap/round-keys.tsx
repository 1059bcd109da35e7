'use client';

const KEYS = ['1', '2', '3', '4', '5', '6', '7', '8', '9', '−', '0', '.'];
const NAMES: Record<string, string> = { '−': 'Minus', '.': 'Decimal point', '⌫': 'Take back one figure' };

/** Big keys for gloves: 64 px, with nothing else between them. */
export function RoundKeys({ onKey }: { onKey: (key: string) => void }) {
  const key = (one: string, label: string, className = '') => (
    <button
      key={one}
      type="button"
      aria-label={NAMES[one] ?? label}
      onClick={() => onKey(one)}
      className={`min-h-16 rounded-lg border border-edge bg-sheet font-mono text-2xl hover:bg-faint active:bg-faint ${className}`}
    >
      {label}
    </button>
  );
  return (
    <div role="group" aria-label="Keys" className="grid grid-cols-4 gap-2">
      <div className="col-span-3 grid grid-cols-3 gap-2">{KEYS.map((one) => key(one, one))}</div>
      <div className="grid grid-rows-2 gap-2">
        {key('⌫', '⌫')}
        {key('Next', 'Next', 'font-sans text-lg font-semibold')}
      </div>
    </div>
  );
}
