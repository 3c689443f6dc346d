/** Two even lines that fill while a page is on its way. */
export function PageLoading() {
  return (
    <div role="status" className="flex flex-col gap-2 py-16">
      <span className="sr-only">Loading</span>
      <span className="bg-petrol h-0.5 w-24 origin-left animate-pulse" />
      <span className="bg-brass h-0.5 w-24 origin-left animate-pulse [animation-delay:300ms]" />
    </div>
  );
}
