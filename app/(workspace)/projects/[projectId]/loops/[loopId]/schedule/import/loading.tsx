import { PageLoading } from '@/components/shell/page-loading';

/** The frame of the page while the draft is read. */
export default function LoadingScheduleImport() {
  return (
    <main className="mx-auto w-full max-w-none flex-1 px-4">
      <PageLoading />
    </main>
  );
}
