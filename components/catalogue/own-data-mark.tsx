/** Marks data that is Evenhead's own and of no maker. */
export const OwnDataMark = () => (
  <span className="border-brass text-brass rounded border px-2 py-0.5 text-xs font-semibold whitespace-nowrap">
    Evenhead’s own data, no maker’s
  </span>
);
