import { ButtonLink } from '@/components/ui/button';
import { Panel } from '@/components/ui/panel';
import { Sentence } from '@/components/ui/sentence';
import type { Preferences } from '@/lib/units/preferences';
import { peopleSentence, type RoleFacts } from '@/lib/wording/people';
import { Audit, type AuditEntry } from './audit';
import { Invitations, type Invitation } from './invitations';
import { Invite } from './invite';
import { Keys, type Key } from './keys';
import type { Member } from './member';
import { Members } from './members';
import { NewKey } from './new-key';

export interface PeopleViewData {
  members: Member[];
  invitations: Invitation[] | null;
  keys: Key[] | null;
  audit: { items: AuditEntry[]; next: string | null } | null;
}

export function PeopleView({
  holding,
  you,
  data,
  roles,
  isMailHere,
  now,
  zone,
  preferences,
}: {
  holding: string;
  you: string;
  data: PeopleViewData;
  roles: RoleFacts[];
  /** Letters stay on this machine, since no mail server is set up. */
  isMailHere: boolean;
  now: number;
  zone: string;
  preferences: Preferences;
}) {
  const { members, invitations, keys, audit } = data;
  const mayManage = invitations !== null;
  return (
    <div className="flex flex-col gap-5">
      <Sentence phrases={peopleSentence(holding, members, invitations?.length ?? 0, roles)} before="People" />
      <Panel
        title="People"
        actions={
          mayManage ? (
            <>
              {isMailHere ? <ButtonLink href="/people/mail">Letters</ButtonLink> : null}
              <Invite roles={roles} isMailHere={isMailHere} />
            </>
          ) : undefined
        }
      >
        {mayManage ? null : (
          <p className="pb-2 text-soft">
            Who owns the holding invites people, changes their roles and removes them.
          </p>
        )}
        <Members members={members} roles={roles} you={you} mayManage={mayManage} zone={zone} />
        {invitations === null ? null : <Invitations invitations={invitations} zone={zone} />}
      </Panel>
      {keys === null ? null : (
        <Panel title="Keys of programs" actions={<NewKey roles={roles} />}>
          <Keys keys={keys} zone={zone} />
        </Panel>
      )}
      {audit === null ? null : (
        <div id="audit" className="scroll-mt-4">
          <Panel title="Audit log" note="newest first">
            <Audit {...audit} now={now} zone={zone} preferences={preferences} />
          </Panel>
        </div>
      )}
    </div>
  );
}
