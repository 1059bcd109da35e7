import { PageLoading } from '@/components/ui/page-loading';

export default function RulesLoading() {
  return <PageLoading what="the rules" />;
}
