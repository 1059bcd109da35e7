import { WorkInButton } from '@/components/shell/work-in-button';

/** The holdings that a person belongs to, where these are several. */
export function Holdings({
  holdings,
  here,
}: {
  holdings: { holdingId: string; holdingName: string; role: string }[];
  here: string;
}) {
  return (
    <ul className="divide-y divide-line border-y border-line">
      {holdings.map(({ holdingId, holdingName, role }) => (
        <li key={holdingId} className="flex flex-wrap items-center justify-between gap-x-4 gap-y-2 py-2">
          <span className="min-w-0 break-words">
            {holdingName}, {role}
            {holdingId === here ? <strong className="font-semibold"> (here)</strong> : null}
          </span>
          {holdingId === here ? null : <WorkInButton id={holdingId} name={holdingName} />}
        </li>
      ))}
    </ul>
  );
}
