'use client';
import dynamic from 'next/dynamic';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Panel } from '@/components/ui/panel';
import { ChannelRow } from './channel-row';
import { useHouse } from './live-house';
import { showWhy, useWhyAddress } from './why-address';

// dialogs cost script that a page which is only read need not load
const AllOffDialog = dynamic(() => import('./all-off-dialog').then((file) => file.AllOffDialog));
const HandDialog = dynamic(() => import('./hand-dialog').then((file) => file.HandDialog));
const WhySheet = dynamic(() => import('./why-sheet').then((file) => file.WhySheet));

type Asked = { what: 'all-off' } | { what: 'on' | 'off' | 'auto'; channel: string };

/** Each load: how it stands, why, and hand / off / auto. */
export function Channels() {
  const { channels, state, allowed, link, controlRuns } = useHouse();
  const [asked, setAsked] = useState<Asked | null>(null);
  const why = useWhyAddress();
  const close = () => setAsked(null);
  const mayHand = allowed.includes('channel.hand');
  const bar = !mayHand
    ? 'Hand, off and auto are the grower’s and the owner’s; your role may look, and prove channels under Wiring.'
    : controlRuns !== true
      ? 'Nothing can be commanded while control does not answer.'
      : null;
  return (
    <Panel
      title="Channels"
      actions={
        <Button
          disabled={bar !== null || channels.length === 0}
          onClick={() => setAsked({ what: 'all-off' })}
        >
          Everything off…
        </Button>
      }
    >
      {bar === null ? null : (
        <p id="no-hand" className="mb-2 text-[0.9rem] text-soft">
          {bar}
        </p>
      )}
      <ul className="divide-y divide-line border-t border-line" data-link={link}>
        {channels.map((channel) => {
          const standing = state?.channels.find((one) => one.key === channel.key);
          return standing === undefined ? null : (
            <ChannelRow
              key={channel.key}
              channel={channel}
              standing={standing}
              barred={bar === null ? undefined : 'no-hand'}
              onWhy={() => showWhy({ channel: channel.key, at: null })}
              onChoose={(choice) => setAsked({ what: choice, channel: channel.key })}
            />
          );
        })}
      </ul>
      {channels.length === 0 ? (
        <p className="border-t border-line py-3 text-soft">No channel is wired yet: begin under Wiring.</p>
      ) : null}
      {why === null ? null : <WhySheet channelKey={why.channel} at={why.at} />}
      {asked === null ? null : asked.what === 'all-off' ? (
        <AllOffDialog onClose={close} />
      ) : (
        <HandDialog
          key={asked.channel + asked.what}
          channelKey={asked.channel}
          choice={asked.what}
          onClose={close}
        />
      )}
    </Panel>
  );
}
