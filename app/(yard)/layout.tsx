import { cookies } from 'next/headers';
import type { ReactNode } from 'react';
import { Shell } from '@/components/shell/shell';
import { requireViewer } from '@/lib/server/next-session';
import { shellFacts } from '@/lib/server/shell';
// its script then comes with the layout's: hydration waits for it, and by itself it is asked for only then
import './error';

export default async function YardLayout({ children }: { children: ReactNode }) {
  const viewer = await requireViewer();
  const facts = await shellFacts(viewer);
  const theme = (await cookies()).get('theme')?.value;
  return (
    <Shell
      data={{
        ...facts,
        person: viewer.name,
        holding: viewer.holdingName,
        theme: theme === 'light' || theme === 'dark' ? theme : 'system',
      }}
    >
      {children}
    </Shell>
  );
}
