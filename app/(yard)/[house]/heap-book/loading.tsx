import { PageLoading } from '@/components/ui/page-loading';

export default function HeapBookLoading() {
  return <PageLoading what="the heap book" />;
}
