'use client';
import { useId } from 'react';
import { capital } from '@/lib/wording/counts';
import { roleSays, type RoleFacts } from '@/lib/wording/people';

/** Each role with what it may do, read from the permission table. */
export function RoleChoice({
  roles,
  value,
  error,
  onChange,
}: {
  roles: RoleFacts[];
  value: string;
  error?: string | undefined;
  onChange: (role: string) => void;
}) {
  const name = useId();
  return (
    <fieldset className="flex flex-col gap-1">
      <legend className="pb-1 text-[0.9rem] text-soft">Role</legend>
      {roles.map((one) => (
        <label key={one.role} className="flex min-h-11 cursor-pointer items-start gap-3 py-1">
          <input
            type="radio"
            name={name}
            value={one.role}
            checked={value === one.role}
            onChange={() => onChange(one.role)}
            className="mt-0.5 size-5 shrink-0 accent-ink"
          />
          <span>
            <span className="font-semibold">{capital(one.role)}</span>
            <span className="block text-[0.9rem] text-soft">{roleSays(one).replace(/^[^:]+: s/, 'S')}</span>
          </span>
        </label>
      ))}
      {error === undefined ? null : <p className="font-semibold text-alarm">{error}</p>}
    </fieldset>
  );
}
