'use client';
import Form from 'next/form';
import { Select } from '@/components/ui/field';
import { Button } from '@/components/ui/button';
import type { DutyAddress } from './address';

/** Which source, how many nights, and beside what. It is a form of the address: it works before its script, by its button. */
export function Choice({
  house,
  address,
  sources,
  ranges,
  others,
}: {
  house: string;
  address: DutyAddress;
  sources: { slug: string; name: string }[];
  ranges: { nights: number; label: string }[];
  /** What the nights can be compared with, in groups. */
  others: { group: string; choices: { value: string; label: string }[] }[];
}) {
  const { from, to } = address;
  return (
    <Form
      action={`/${house}/duty`}
      className="not-on-paper flex flex-wrap items-end gap-3"
      onChange={(event) => event.currentTarget.requestSubmit()}
    >
      <Select
        label="Source"
        name="source"
        defaultValue={address.source ?? sources[0]?.slug ?? ''}
        className="w-40"
      >
        {sources.map((source) => (
          <option key={source.slug} value={source.slug}>
            {source.name}
          </option>
        ))}
      </Select>
      <Select label="Nights" name="nights" defaultValue={String(address.nights)} className="w-60">
        {ranges.map((range) => (
          <option key={range.nights} value={range.nights}>
            {range.label}
          </option>
        ))}
      </Select>
      <Select label="Compare with" name="against" defaultValue={address.against ?? ''} className="w-56">
        <option value="">Nothing</option>
        {others.map(({ group, choices }) => (
          <optgroup key={group} label={group}>
            {choices.map((choice) => (
              <option key={choice.value} value={choice.value}>
                {choice.label}
              </option>
            ))}
          </optgroup>
        ))}
      </Select>
      {from === undefined || to === undefined ? null : (
        <>
          <input type="hidden" name="from" value={from} />
          <input type="hidden" name="to" value={to} />
        </>
      )}
      {address.sort === 'night' ? null : <input type="hidden" name="sort" value={address.sort} />}
      {address.order === 'up' ? null : <input type="hidden" name="order" value={address.order} />}
      <noscript>
        <Button type="submit">Show</Button>
      </noscript>
    </Form>
  );
}
