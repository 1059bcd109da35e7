import type { Metadata } from 'next';
import { Notice } from '@/components/ui/notice';
import { Sentence } from '@/components/ui/sentence';
import { NewHouse } from '@/components/wiring/new-house';
import { requireViewer } from '@/lib/server/next-session';
import { shellFacts } from '@/lib/server/shell';

export const metadata: Metadata = { title: 'New house' };

export default async function NewHousePage() {
  const viewer = await requireViewer();
  const { preferences } = await shellFacts(viewer);
  return (
    <div className="flex flex-col gap-5">
      <Sentence phrases={['Where does the house stand, and at what cold must it act?']} before="New house" />
      {viewer.allowed.includes('yard.write') ? (
        <NewHouse preferences={preferences} />
      ) : (
        <Notice tone="quiet" title="An installer or an owner adds houses.">
          As soon as one is there you find it here, with its rules and its heap book.
        </Notice>
      )}
    </div>
  );
}
