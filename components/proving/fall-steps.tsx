'use client';
import { Button } from '@/components/ui/button';
import { fellWords } from '@/lib/wording/proving';
import { BIG } from './big';
import { useProving } from './context';
import { RunButton } from './run-button';
import { Running } from './running';

/** The run outlasts a lease, so that it is the lease, or the lost power, that ends it. */
export function UnpluggedStep() {
  const { act, busy, proof, channel } = useProving();
  const run = proof?.runs.find((one) => one.kind === 'unplug');
  const say = (fell: boolean) => act('POST', 'steps', { step: 'unplugged', fell });
  const words = fellWords(run?.fell?.how ?? null, run?.fell?.awayS ?? null);
  return (
    <div className="flex flex-col gap-3">
      {run !== undefined && !run.isOver && words === null ? (
        <>
          <Running run={run} isOrdered={channel.contact === 'NO'} />
          <p className="text-[1.05rem] font-semibold">
            Pull the network of {channel.node} NOW. Watch the load. Put it back after a minute.
          </p>
        </>
      ) : null}
      {run === undefined ? null : (
        <p role="status" className={words === null ? '' : 'font-semibold'}>
          {words ?? `Waiting for ${channel.node} to tell of it. It speaks when its network is back.`}
        </p>
      )}
      {words === null ? null : (
        <Button kind="primary" className={BIG} busy={busy} onClick={() => void say(true)}>
          {channel.contact === 'NO' ? 'The load stopped' : 'The load started'}
        </Button>
      )}
      {run === undefined || run.isOver || words !== null ? (
        <RunButton
          kind="unplug"
          label={run === undefined ? 'Begin: the load runs for 60 s' : 'Begin once more, 60 s'}
        />
      ) : null}
      {run === undefined ? null : (
        <Button className={BIG} busy={busy} onClick={() => void say(false)}>
          It did not fall to its safe state
        </Button>
      )}
    </div>
  );
}

export function FallbackStep() {
  const { act, busy } = useProving();
  const say = (ran: boolean) => act('POST', 'steps', { step: 'fallback', ran });
  return (
    <div className="flex flex-col gap-2">
      <Button kind="primary" className={BIG} busy={busy} onClick={() => void say(true)}>
        It ran by its fallback
      </Button>
      <Button className={BIG} busy={busy} onClick={() => void say(false)}>
        It did not
      </Button>
    </div>
  );
}
