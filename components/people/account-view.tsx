import { Reading, type ThemeChoice } from '@/components/shell/reading';
import { SignOut } from '@/components/shell/sign-out';
import { Figures, Panel } from '@/components/ui/panel';
import { Sentence } from '@/components/ui/sentence';
import type { Preferences } from '@/lib/units/preferences';
import { day } from '@/lib/units/time';
import { roleSays, type RoleFacts } from '@/lib/wording/people';
import { Holdings } from './holdings';
import { PasswordForm } from './password-form';
import { SignOutElsewhere } from './sign-out-elsewhere';

export interface OpenSession {
  id: string;
  createdAt: number;
  address: string | null;
  device: string | null;
}

/** Everything of one's own: how one reads, one's password, where one is signed in. */
export function AccountView({
  person,
  role,
  sessions,
  holdings,
  theme,
  preferences,
}: {
  person: { name: string; email: string; holdingId: string; holdingName: string; sessionId: string };
  role: RoleFacts;
  sessions: OpenSession[];
  holdings: { holdingId: string; holdingName: string; role: string }[];
  theme: ThemeChoice;
  preferences: Preferences;
}) {
  return (
    <div className="flex flex-col gap-5">
      <Sentence
        before="Account"
        phrases={[
          'You are ',
          { text: person.name, tone: 'strong' },
          `, ${role.role} of ${person.holdingName}.`,
        ]}
      />
      <div className="grid gap-5 lg:grid-cols-2 lg:items-start">
        <div className="flex flex-col gap-5">
          <Panel title="You">
            <Figures
              rows={[
                { name: 'Name', value: person.name },
                { name: 'E-mail', value: <span className="break-all">{person.email}</span> },
              ]}
            />
            <p className="pt-2 text-soft">{roleSays(role)}</p>
          </Panel>
          {holdings.length < 2 ? null : (
            <Panel title="Your holdings">
              <Holdings holdings={holdings} here={person.holdingId} />
            </Panel>
          )}
          <Panel title="How you read">
            <Reading preferences={preferences} theme={theme} />
          </Panel>
        </div>
        <div className="flex flex-col gap-5">
          <Panel title="A new password">
            <PasswordForm />
          </Panel>
          <Panel title="Where you are signed in">
            <ul className="divide-y divide-line border-y border-line">
              {sessions.map((session) => (
                <li key={session.id} className="flex flex-wrap justify-between gap-x-4 py-2">
                  <span className="min-w-0 break-words">
                    {deviceName(session.device)}
                    {session.id === person.sessionId ? (
                      <strong className="font-semibold"> (here)</strong>
                    ) : null}
                  </span>
                  <span className="font-mono text-[0.9rem] text-soft">
                    since {day(session.createdAt, 'UTC')}
                    {session.address === null || session.address === '' ? '' : `, ${session.address}`}
                  </span>
                </li>
              ))}
            </ul>
            <div className="mt-3 flex flex-wrap gap-2">
              <SignOut />
              {sessions.length > 1 ? <SignOutElsewhere /> : null}
            </div>
          </Panel>
        </div>
      </div>
    </div>
  );
}

const DEVICES: [pattern: RegExp, name: string][] = [
  [/iPhone/, 'iPhone'],
  [/iPad/, 'iPad'],
  [/Android.*Mobile/, 'Android phone'],
  [/Android/, 'Android tablet'],
  [/Windows/, 'Windows computer'],
  [/Mac OS X/, 'Mac'],
  [/Linux/, 'Linux computer'],
];

/** What a person would call it; a browser's own string tells nobody anything. */
function deviceName(device: string | null): string {
  return DEVICES.find(([pattern]) => pattern.test(device ?? ''))?.[1] ?? 'Another program';
}
