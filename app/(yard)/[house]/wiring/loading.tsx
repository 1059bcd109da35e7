import { PageLoading } from '@/components/ui/page-loading';

export default function WiringLoading() {
  return <PageLoading what="how the house is wired" />;
}
