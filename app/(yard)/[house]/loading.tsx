import { Loading, Skeleton } from '@/components/ui/states';

export default function PageLoading() {
  return (
    <Loading what="the page">
      <Skeleton className="h-20 max-w-3xl" />
      <Skeleton className="h-96" />
      <Skeleton className="h-48" />
    </Loading>
  );
}
