'use client';
import { Button } from '@/components/ui/button';
import { Field, control } from '@/components/ui/field';

export const MOST_BYTES = 10 * 1024 ** 2;
const TYPES = ['image/jpeg', 'image/png', 'image/webp'];

/** Pictures to go with an entry. What a phone writes into them, place and all, is taken out where they arrive. */
export function PhotoField({
  files,
  error,
  onChange,
}: {
  files: readonly File[];
  error?: string | undefined;
  onChange: (files: File[]) => void;
}) {
  return (
    <div className="flex flex-col gap-1">
      <Field
        label="Photographs"
        hint="JPEG, PNG or WebP, 10 MB each. Place and camera are taken out."
        error={error}
      >
        {(links) => (
          <input
            type="file"
            accept={TYPES.join(',')}
            multiple
            className={control}
            onChange={(event) => {
              onChange([...files, ...(event.target.files ?? [])]);
              // the same picture may be chosen again after it was taken out
              event.target.value = '';
            }}
            {...links}
          />
        )}
      </Field>
      <ul className="flex flex-col gap-1 empty:hidden">
        {files.map((file, place) => (
          <li key={`${file.name} ${place}`} className="flex items-center justify-between gap-2">
            <span className="min-w-0 truncate">{file.name}</span>
            <Button onClick={() => onChange(files.filter((_, other) => other !== place))}>
              Take out<span className="sr-only"> {file.name}</span>
            </Button>
          </li>
        ))}
      </ul>
    </div>
  );
}

/** In words what is wrong with a picture before it is sent; null for what may go. */
export function photoError(files: readonly File[]): string | undefined {
  const large = files.find((file) => file.size > MOST_BYTES);
  if (large !== undefined) return `${large.name} is over 10 MB.`;
  const other = files.find((file) => !TYPES.includes(file.type));
  return other === undefined ? undefined : `${other.name} is no JPEG, PNG or WebP picture.`;
}
