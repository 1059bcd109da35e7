import { PrintButton } from '@/components/duty/print-button';
import { Button, ButtonLink } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/check';
import { Panel } from '@/components/ui/panel';
import { TabLinks } from '@/components/ui/tabs';
import type { SpanOfNights } from '@/lib/analysis/report-span';
import { SECTIONS, SPANS } from '@/lib/schema/report';
import { type ReportAddress, reportHref } from './address';
import { SECTION_WORDS, SPAN_WORDS } from './words';

/** Which nights and which sections; the address keeps both. Works without a script. */
export function ReportControls({
  house,
  address,
  report,
}: {
  house: string;
  address: ReportAddress;
  report: { before: SpanOfNights; after: SpanOfNights | null };
}) {
  const { before, after } = report;
  const { span, night, sections, isOfAll } = address;
  const to = (change: Partial<ReportAddress>) => reportHref(house, { ...address, ...change });
  return (
    <Panel title="What to report" actions={<PrintButton />}>
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <TabLinks
          label="How long"
          links={SPANS.map((one) => ({
            href: to({ span: one }),
            label: SPAN_WORDS[one],
            current: one === span,
          }))}
        />
        <div className="flex flex-wrap gap-2">
          <ButtonLink href={to({ night: before.from })}>The {span} before</ButtonLink>
          <ButtonLink href={to({ isOfAll: !isOfAll })}>
            {isOfAll ? 'This house only' : 'All houses'}
          </ButtonLink>
          {after === null ? null : <ButtonLink href={to({ night: after.from })}>The {span} after</ButtonLink>}
        </div>
      </div>
      <form action={`/${house}/reports`} className="mt-3">
        <input type="hidden" name="span" value={span} />
        {isOfAll ? <input type="hidden" name="of" value="all" /> : null}
        {night === undefined ? null : <input type="hidden" name="night" value={night} />}
        <fieldset className="flex flex-wrap items-center gap-x-5">
          <legend className="text-[0.9rem] text-soft">Sections</legend>
          {SECTIONS.map((section) => (
            <Checkbox
              key={section}
              name="section"
              value={section}
              label={SECTION_WORDS[section]}
              defaultChecked={sections.includes(section)}
            />
          ))}
          <Button type="submit">Show these</Button>
        </fieldset>
      </form>
    </Panel>
  );
}
