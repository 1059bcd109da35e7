/** Written by hand at the panel: what no software knows. */
const LINES = [
  'The isolator is at',
  'The thermostat of last resort is at',
  'The consumer unit and its residual-current device are at',
  'Who may open the panel, and how to reach them',
  'Wired by, on',
  'Proved by, on',
];

export function Signatures() {
  return (
    <section className="print:break-inside-avoid">
      <h2 className="font-semibold">To be filled in by hand</h2>
      <dl className="mt-1 grid gap-x-6 gap-y-4 sm:grid-cols-2 print:grid-cols-2">
        {LINES.map((line) => (
          <div key={line}>
            <dt className="text-soft">{line}</dt>
            <dd className="relative h-7 border-b border-edge">
              <span className="sr-only">a line to write on</span>
            </dd>
          </div>
        ))}
      </dl>
    </section>
  );
}
