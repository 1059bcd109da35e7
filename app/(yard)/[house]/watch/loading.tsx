import { Loading, Skeleton } from '@/components/ui/states';

export default function WatchLoading() {
  return (
    <Loading what="how the house stands">
      <Skeleton className="h-28 max-w-4xl" />
      <div className="grid gap-5 lg:grid-cols-[minmax(0,2fr)_minmax(0,1fr)]">
        <Skeleton className="h-[28rem]" />
        <Skeleton className="h-[28rem]" />
      </div>
      <Skeleton className="h-72" />
    </Loading>
  );
}
