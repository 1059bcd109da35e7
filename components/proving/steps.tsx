'use client';
import type { ProofStep } from '@/lib/analysis/proof';
import { nextStep } from '@/lib/analysis/proof';
import type { Proof, ProofStepStanding } from '@/lib/schema/proof';
import { clock, day } from '@/lib/units/time';
import { foundWords, notNeededWords, STEP_TITLES, whyWords } from '@/lib/wording/proving';
import { ConfirmStep } from './confirm-step';
import { useProving } from './context';
import { CurrentStep } from './current-step';
import { FallbackStep, UnpluggedStep } from './fall-steps';
import { GainStep } from './gain-step';
import { LastResortStep } from './last-resort-step';
import { PhotographsStep } from './photographs-step';
import { Pictures } from './pictures';
import { RatingStep } from './rating-step';
import { RunStep, SeenStep } from './run-step';

const FORMS: Record<ProofStep, () => React.ReactNode> = {
  dead: () => <ConfirmStep step="dead" />,
  rating: () => <RatingStep />,
  photographs: () => <PhotographsStep />,
  clear: () => <ConfirmStep step="clear" />,
  run: () => <RunStep />,
  seen: () => <SeenStep />,
  current: () => <CurrentStep />,
  gain: () => <GainStep />,
  unplugged: () => <UnpluggedStep />,
  fallback: () => <FallbackStep />,
  'last-resort': () => <LastResortStep />,
};

const MARKS = {
  done: ['✓', 'done'],
  without: ['–', 'left out'],
  failed: ['✕', 'failed'],
  open: ['', 'to do'],
  'not-needed': ['·', 'not needed'],
} as const;

/** The record, a step a row; the one whose turn it is stands open. */
export function Steps({ proof, mayProve }: { proof: Proof; mayProve: boolean }) {
  const { failure } = useProving();
  const turn =
    mayProve && proof.endedAt === null
      ? nextStep(proof.steps.map((one) => ({ ...one, because: null, word: null })))
      : null;
  return (
    <ol className="divide-y divide-line">
      {proof.steps.map((one) => (
        <StepRow key={one.step} standing={one} proof={proof} isTurn={one.step === turn}>
          {one.step === turn ? (
            <div className="mt-3 flex flex-col gap-2">
              {FORMS[one.step]()}
              <p role="alert" className="font-semibold text-alarm empty:hidden">
                {failure?.message}
              </p>
            </div>
          ) : null}
        </StepRow>
      ))}
    </ol>
  );
}

function StepRow({
  standing,
  proof,
  isTurn,
  children,
}: {
  standing: ProofStepStanding;
  proof: Proof;
  isTurn: boolean;
  children: React.ReactNode;
}) {
  const { channel, isHeapFan } = useProving();
  const { step, state } = standing;
  const [mark, word] = MARKS[state];
  return (
    <li aria-current={isTurn ? 'step' : undefined} className="flex gap-3 py-3">
      <span aria-hidden="true" className="w-5 shrink-0 text-center text-ember">
        {isTurn ? '→' : mark}
      </span>
      <div className="min-w-0 flex-1">
        <p className={isTurn ? 'text-[1.1rem] font-semibold' : state === 'open' ? '' : 'text-soft'}>
          {STEP_TITLES[step]}
          <span className="sr-only">, {isTurn ? 'your turn' : word}</span>
        </p>
        {isTurn ? (
          <p className="mt-1 text-[0.95rem] text-soft">
            {whyWords(step, { kind: channel.load.kind, contact: channel.contact, isHeapFan })}
          </p>
        ) : null}
        <StepFound standing={standing} />
        {step === 'photographs' && !isTurn ? <Pictures pictures={proof.pictures} /> : null}
        {children}
      </div>
    </li>
  );
}

function StepFound({ standing: { state, because, record } }: { standing: ProofStepStanding }) {
  const { house, preferences } = useProving();
  if (state === 'not-needed')
    return <p className="text-[0.9rem] text-soft">{notNeededWords(because ?? '')}</p>;
  if (record === null) return null;
  const found = foundWords(record, preferences);
  const at = Date.parse(record.at);
  return (
    <p className={state === 'failed' ? 'text-[0.95rem] font-semibold text-alarm' : 'text-[0.9rem] text-soft'}>
      {state === 'failed' ? 'Failed. Mend it with the circuit dead, then go through it again. ' : ''}
      {found === null ? '' : `${found} `}
      {record.note === null ? '' : `“${record.note}” `}
      {record.by}, {day(at, house.zone)}, {clock(at, house.zone, preferences)}.
    </p>
  );
}
