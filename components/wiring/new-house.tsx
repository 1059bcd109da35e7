'use client';
import { useRouter } from 'next/navigation';
import { useEffect } from 'react';
import { Button } from '@/components/ui/button';
import { useAwake } from '@/components/ui/use-awake';
import type { Preferences } from '@/lib/units/preferences';
import { houseGroups } from './forms/house';
import { PlaceRemarks } from './place-remarks';
import { at } from './spec';
import { SpecFields } from './spec-fields';
import { useSpecForm } from './use-spec-form';

/** A house from nothing: where it stands and at what cold it acts. Its set-up goes on from there. */
export function NewHouse({ preferences }: { preferences: Preferences }) {
  const router = useRouter();
  const isAwake = useAwake();
  const { form, submit, failure } = useSpecForm({
    groups: houseGroups,
    schema: () => import('@/lib/schema/house').then((module) => module.HouseCreate),
    entity: { altitude: 0, frostLimit: 3, frostAlarm: 2 },
    preferences,
    method: 'POST',
    path: '/houses',
    onAnswer: (answer) => {
      const slug = at(answer, 'slug');
      router.push(typeof slug === 'string' ? `/${slug}/setup` : '/');
      router.refresh();
    },
  });
  useEffect(() => {
    // only the browser knows it, so it comes after the first paint, and never over what somebody typed
    if (form.getValues('zone') === '')
      form.setValue('zone', Intl.DateTimeFormat().resolvedOptions().timeZone);
  }, [form]);
  return (
    <form
      noValidate
      onSubmit={submit}
      className="flex max-w-2xl flex-col gap-4 rounded-lg border border-line bg-sheet p-4"
    >
      <fieldset disabled={!isAwake} className="flex flex-col gap-4">
        <SpecFields groups={houseGroups} form={form} preferences={preferences} />
        <PlaceRemarks form={form} preferences={preferences} />
      </fieldset>
      <p role="alert" className="font-semibold text-alarm empty:hidden">
        {failure}
      </p>
      <Button
        type="submit"
        kind="primary"
        className="self-start"
        disabled={!isAwake}
        busy={form.formState.isSubmitting}
      >
        Add the house
      </Button>
    </form>
  );
}
