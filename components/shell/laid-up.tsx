import { Notice } from '@/components/ui/notice';
import { InServiceButton } from './in-service-button';

/** Over every page of a house that came out of an archive, until it is put in service. */
export function LaidUp({ house, mayServe }: { house: { slug: string; name: string }; mayServe: boolean }) {
  return (
    <div className="not-on-paper mb-5">
      <Notice
        tone="warn"
        title={`${house.name} is laid up: nothing drives it`}
        actions={mayServe ? <InServiceButton house={house} /> : undefined}
      >
        It came out of an archive. No relay moves, no alarm rings and no node is let in until{' '}
        {mayServe ? 'you put it in service.' : 'an owner puts it in service.'} What was recorded is here to be
        read.
      </Notice>
    </div>
  );
}
