import { Loading, Skeleton } from './states';

/**
 * Keeps the place of a page. Each page that nobody can miss has it as a loading.tsx of its own. There is none in a folder
 * above a page that may not be there: a page that has begun to load has answered 200, and cannot be "not found" any more.
 */
export function PageLoading({ what }: { what: string }) {
  return (
    <Loading what={what}>
      <Skeleton className="h-20 max-w-3xl" />
      <Skeleton className="h-96" />
      <Skeleton className="h-48" />
    </Loading>
  );
}
