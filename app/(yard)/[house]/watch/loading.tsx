import { PageLoading } from '@/components/ui/page-loading';

export default function WatchLoading() {
  return <PageLoading what="how the house stands" />;
}
