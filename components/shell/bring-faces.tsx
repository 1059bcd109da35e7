'use client';
import { useEffect } from 'react';

const A_YEAR_S = 31_536_000;

/**
 * Fetches the faces on a first visit, when the page's script has done its work: before it, they would take the line from
 * what answers a finger. Until all are there the page stands in stand-ins of the same widths, and changes once.
 * @param families as the style sheet names them
 */
export function BringFaces({ families }: { families: string[] }) {
  useEffect(() => {
    Promise.all(families.map((family) => document.fonts.load(`1em ${family}`))).then(
      () => {
        document.documentElement.removeAttribute('data-faces');
        document.cookie = `faces=kept; Path=/; Max-Age=${A_YEAR_S}; SameSite=Lax`;
      },
      () => undefined, // without a line the stand-ins stay, and the next page tries again
    );
  }, [families]);
  return null;
}
