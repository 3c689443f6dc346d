/** The frame of the page while the stations are read. */
export default function LoadingStations() {
  return (
    <main className="mx-auto flex w-full max-w-6xl flex-1 flex-col gap-4 p-4 lg:py-6" aria-busy>
      <p role="status" className="text-quiet">
        Opening the stations…
      </p>
      {[12, 6, 18].map((rem) => (
        <div key={rem} className="bg-sheet animate-pulse rounded border" style={{ height: `${rem}rem` }} />
      ))}
    </main>
  );
}
