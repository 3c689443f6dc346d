/** A loop whose design is still a draft: what is missing, and who does what next. */
export const NotIssued = ({ name }: { name: string }) => (
  <main className="m-auto flex max-w-md flex-col items-center gap-4 p-6 text-center">
    <svg width="220" height="56" viewBox="0 0 220 56" aria-hidden>
      <path d="M0 28H220" stroke="var(--brass)" />
      {Array.from({ length: 16 }, (_, i) => (
        <path key={i} d={`M${12 + i * 13} 24v8`} stroke="var(--quiet)" />
      ))}
    </svg>
    <h1>{name} has not been issued yet</h1>
    <p className="text-quiet">
      Stations, design flows and settings come from the issued revision. As soon as the designer issues the first one, the stations stand
      here in walking order, ready for a round.
    </p>
  </main>
);
