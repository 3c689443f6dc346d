import { PageLoading } from '@/components/shell/page-loading';

export default function Loading() {
  return (
    <main className="mx-auto max-w-6xl px-4">
      <PageLoading />
    </main>
  );
}
