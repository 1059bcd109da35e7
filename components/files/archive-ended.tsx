import { WorkInButton } from '@/components/shell/work-in-button';
import { ButtonLink } from '@/components/ui/button';
import type { Archive } from '@/lib/schema/archive';

/** How bringing an archive in ended, and where to go from there. */
export function ArchiveEnded({ one, files }: { one: Archive; files: string }) {
  const others = one.found?.people.filter((person) => person.email !== one.by) ?? [];
  if (one.into === null)
    return (
      <div className="flex flex-col items-start gap-3">
        <p role="status" className="max-w-prose font-semibold text-alarm">
          {one.name} was not brought in; nothing of it was kept.
        </p>
        <p className="max-w-prose break-words">{one.problem}</p>
        <ButtonLink href={files}>Choose another file</ButtonLink>
      </div>
    );
  return (
    <div className="flex flex-col items-start gap-3">
      <p role="status" className="max-w-prose">
        {one.into.name} is there, beside this holding, and you own it. Its houses are laid up; put each in
        service on its own pages.
      </p>
      {others.length === 0 ? null : (
        <p className="max-w-prose text-soft">
          Invite anew on its page of people, where they should go on:{' '}
          {others.map((person) => `${person.email} (${person.role})`).join(', ')}.
        </p>
      )}
      <div className="flex flex-wrap gap-2">
        <WorkInButton id={one.into.id} name={one.into.name} kind="primary" />
        <ButtonLink href={files}>Stay here</ButtonLink>
      </div>
    </div>
  );
}
