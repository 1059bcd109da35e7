'use client';
import { lazy, Suspense } from 'react';
import { Skeleton } from '@/components/ui/states';
import { WhenSeen } from '@/components/ui/when-seen';
import type { OutdoorsChartProps } from './heat-outdoors-chart';

// the chart's library is larger than all of the page before it
const Chart = lazy(() => import('./heat-outdoors-chart'));

// stands far under the screen's edge: what breathes there would cost frames and battery, and nobody sees it
const place = <div className="h-52" />;

/** The scatter of heat against the cold outdoors, fetched when somebody scrolls to it. */
export function HeatOutdoors(props: OutdoorsChartProps) {
  return (
    <div role="img" aria-label={props.said} className="h-52">
      <WhenSeen instead={place}>
        {() => (
          <Suspense fallback={<Skeleton className="h-52" />}>
            <Chart {...props} />
          </Suspense>
        )}
      </WhenSeen>
    </div>
  );
}
