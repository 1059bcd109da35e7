import { TextField } from '@/components/ui/field';

/** Long, not contrived: the length is what counts, and pasting from a password book is welcome. */
export function NewPassword({ name, error }: { name: string; error: string | undefined }) {
  return (
    <TextField
      label="New password"
      hint="15 characters or more: four plain words that do not belong together will do."
      name={name}
      type="password"
      autoComplete="new-password"
      required
      maxLength={256}
      error={error}
    />
  );
}
