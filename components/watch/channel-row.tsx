import { classes } from '@/components/ui/classes';
import { Segmented } from '@/components/ui/segmented';
import type { WatchChannel } from '@/lib/schema/watch-view';
import type { StateChannel } from '@/lib/schema/house-state';
import { becauseWords } from '@/lib/wording/because';
import { reportWords, stateWord } from '@/lib/wording/channel-state';
import { useHouse } from './live-house';

export type HandChoice = 'on' | 'off' | 'auto';

/** The same patterns as in the strips: run filled, rest hatched, held dotted, hand outlined. */
function Mark({ standing }: { standing: StateChannel }) {
  const on = standing.state === 'on';
  const held = ['lock-out', 'interlock', 'limit', 'source-guard', 'fail-safe'].includes(standing.claim);
  return (
    <svg aria-hidden="true" viewBox="0 0 12 12" className="size-3 shrink-0">
      {on ? <rect width="12" height="12" className="fill-ember" /> : null}
      {!on && standing.claim === 'rest' ? (
        <path d="M0 6L6 0M0 12L12 0M6 12L12 6" className="stroke-ember" strokeWidth="1.8" />
      ) : null}
      {!on && held ? (
        <g className="fill-ink">
          {[2.5, 6, 9.5].flatMap((x) =>
            [2.5, 6, 9.5].map((y) => <circle key={`${x}-${y}`} cx={x} cy={y} r="1.1" />),
          )}
        </g>
      ) : null}
      <rect
        x="0.6"
        y="0.6"
        width="10.8"
        height="10.8"
        fill="none"
        strokeWidth="1.2"
        className={standing.mode === 'hand' ? 'stroke-ink' : on ? 'stroke-ember' : 'stroke-edge'}
      />
    </svg>
  );
}

export function ChannelRow({
  channel,
  standing,
  barred,
  onWhy,
  onChoose,
}: {
  channel: WatchChannel;
  standing: StateChannel;
  /** Id of the words that say why nothing can be commanded here. */
  barred: string | undefined;
  onWhy: () => void;
  onChoose: (choice: HandChoice) => void;
}) {
  const { scene, isStale } = useHouse();
  const word = stateWord(standing, channel.loadKind);
  const report = isStale ? null : reportWords(standing);
  const mode: HandChoice = standing.mode === 'hand' ? standing.state : 'auto';
  return (
    <li className="grid grid-cols-[minmax(0,1fr)_auto] items-start gap-x-4 gap-y-2 py-3 md:grid-cols-[minmax(0,10.5rem)_minmax(0,1fr)_auto]">
      <div className="min-w-0">
        <p className="font-semibold">
          <span className="text-soft">{channel.number} · </span>
          {channel.label}
        </p>
        <p
          data-channel={channel.key}
          data-state={standing.state}
          className={classes(
            'flex items-center gap-2',
            standing.state === 'on' ? 'font-semibold text-ember' : 'text-ink',
          )}
        >
          <Mark standing={standing} />
          {isStale ? `Last seen ${word.toLowerCase()}` : word}
        </p>
      </div>
      <div className="order-3 col-span-2 min-w-0 text-[0.95rem] text-soft md:order-none md:col-span-1">
        <p>{becauseWords(standing.claim, standing.because, scene)}</p>
        {report === null ? null : <p className="font-semibold text-warn">{report}</p>}
        <button
          type="button"
          onClick={onWhy}
          className="-mb-2 inline-flex min-h-11 items-center underline underline-offset-4 hover:text-ink"
        >
          Why, and what next
          <span className="sr-only">
            : {channel.label}, {word.toLowerCase()}
          </span>
        </button>
      </div>
      <div className="md:justify-self-end">
        <Segmented
          label={`${channel.label}: hand, off or auto`}
          value={mode}
          options={[
            { value: 'on', label: channel.loadKind === 'vent' ? 'Open' : 'Hand' },
            { value: 'off', label: channel.loadKind === 'vent' ? 'Shut' : 'Off' },
            { value: 'auto', label: 'Auto' },
          ]}
          disabled={barred !== undefined || standing.lockedOut}
          describedBy={barred}
          onChoose={onChoose}
        />
      </div>
    </li>
  );
}
