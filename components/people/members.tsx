import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import { day } from '@/lib/units/time';
import { capital } from '@/lib/wording/counts';
import type { RoleFacts } from '@/lib/wording/people';
import type { Member } from './member';
import { MemberControls } from './member-controls';

export function Members({
  members,
  roles,
  you,
  mayManage,
  zone,
}: {
  members: Member[];
  roles: RoleFacts[];
  /** User id of the reader. */
  you: string;
  mayManage: boolean;
  zone: string;
}) {
  return (
    <Table
      caption="People of the holding"
      captionHidden
      columns={[
        { key: 'name', label: 'Name' },
        { key: 'email', label: 'E-mail', wideOnly: true },
        { key: 'role', label: 'Role' },
        { key: 'since', label: 'Since', figure: true, wideOnly: true },
        ...(mayManage ? [{ key: 'change', label: 'Change', labelHidden: true }] : []),
      ]}
    >
      {members.map((member) => (
        <Row key={member.id}>
          <RowHead className="break-words">
            {member.name}
            {member.userId === you ? <span className="font-normal text-soft"> (you)</span> : null}
          </RowHead>
          <Cell wideOnly className="break-all">
            {member.email}
          </Cell>
          <Cell>{capital(member.role)}</Cell>
          <Cell figure wideOnly>
            {day(member.since, zone)}
          </Cell>
          {mayManage ? (
            <Cell className="py-1">
              <MemberControls member={member} roles={roles} isYou={member.userId === you} />
            </Cell>
          ) : null}
        </Row>
      ))}
    </Table>
  );
}
