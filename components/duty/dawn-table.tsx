'use client';
import { useCallback, useState } from 'react';

/** The chart's figures. Its rows are made when it is opened: a year of them, unseen, would hold up all of the page. */
export function DawnTable({ rows }: { rows: [day: string, core: string][] }) {
  const [isOpen, setOpen] = useState(false);
  // it may have been opened before its script was there
  const look = useCallback((details: HTMLDetailsElement | null) => {
    if (details?.open === true) setOpen(true);
  }, []);
  return (
    <details ref={look} onToggle={(event) => look(event.currentTarget)} className="text-[0.9rem]">
      <summary className="flex min-h-11 cursor-pointer items-center text-soft hover:text-ink">
        As a table
      </summary>
      <table className="w-full">
        <caption className="sr-only">Core at dawn</caption>
        <tbody>
          {(isOpen ? rows : []).map(([day, core], place) => (
            <tr key={place} className="border-t border-faint">
              <th scope="row" className="py-1 text-left font-normal">
                {day}
              </th>
              <td className="py-1 text-right font-mono">{core}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </details>
  );
}
