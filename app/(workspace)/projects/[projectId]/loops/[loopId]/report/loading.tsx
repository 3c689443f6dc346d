import { PageLoading } from '@/components/shell/page-loading';

/** The frame of the page while the report is put together. */
export default function LoadingReport() {
  return (
    <main className="mx-auto w-full max-w-[78rem] flex-1 px-4">
      <PageLoading />
    </main>
  );
}
