import { ButtonLink } from '@/components/ui/button';
import { Panel } from '@/components/ui/panel';
import { Sentence } from '@/components/ui/sentence';
import { Empty } from '@/components/ui/states';
import { TabLinks } from '@/components/ui/tabs';
import type { Balance } from '@/lib/analysis/money-balance';
import type { HeapCost, MoneyBook } from '@/lib/schema/money';
import { moneySentence } from '@/lib/wording/money';
import { Alternatives } from './alternatives';
import { CostsPanel } from './costs-panel';
import { FanHours } from './fan-hours';
import { PricesPanel } from './prices-panel';
import { SeasonFigures } from './season-figures';

export interface MoneyViewData {
  book: MoneyBook;
  sources: { slug: string; name: string }[];
  source: { slug: string; name: string } | null;
  season: { name: string; from: string };
  balance: Balance | null;
  costs: (HeapCost & { share: number })[];
}

export function MoneyView({
  house,
  data,
  today,
  mayWrite,
}: {
  house: { slug: string; name: string };
  data: MoneyViewData;
  today: string;
  mayWrite: boolean;
}) {
  const { source, balance, book, season } = data;
  if (source === null || balance === null)
    return (
      <>
        <h1 className="sr-only">Money of {house.name}</h1>
        <Empty
          title={`${house.name} has no source of heat yet.`}
          action={<ButtonLink href={`/${house.slug}/wiring`}>Go to Wiring</ButtonLink>}
        >
          <p>Money tells what the heat of a heap costs. Enter the source and its channel on Wiring.</p>
        </Empty>
      </>
    );
  const { currency } = book;
  const links = data.sources.map((one) => ({
    href: `/${house.slug}/money?source=${one.slug}`,
    label: one.name,
    current: one.slug === source.slug,
  }));
  return (
    <div className="flex flex-col gap-4">
      <Sentence
        before="Money"
        phrases={moneySentence({ source: source.name, season: season.name, currency, balance })}
      />
      {links.length > 1 ? <TabLinks label="Source" links={links} /> : null}
      <div className="grid gap-4 lg:grid-cols-[minmax(0,1fr)_24rem] lg:items-start">
        <div className="flex min-w-0 flex-col gap-4">
          {currency === null ? null : <SeasonFigures {...{ balance, currency }} season={season.name} />}
          {currency === null ? null : <Alternatives {...{ balance, currency }} fuels={book.fuels} />}
          <CostsPanel
            {...{ today, mayWrite, currency }}
            house={house.slug}
            source={source.slug}
            costs={data.costs}
          />
        </div>
        <div className="flex min-w-0 flex-col gap-4">
          <PricesPanel key={book.revision} {...{ book, today, mayWrite }} />
          {currency === null || balance.fan.uses.length === 0 ? null : (
            <Panel title="When the fan ran">
              <FanHours uses={balance.fan.uses} currency={currency} />
            </Panel>
          )}
        </div>
      </div>
    </div>
  );
}
