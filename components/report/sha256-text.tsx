/** The first digits of a SHA-256, enough to compare by eye; the whole of it on demand. */
export function ShortSha256({ sha256 }: { sha256: string }) {
  return (
    <abbr title={sha256} className="figures text-quiet text-xs no-underline">
      {sha256.slice(0, 4)} {sha256.slice(4, 8)} {sha256.slice(8, 12)}
    </abbr>
  );
}
