const circuits = [0, 1, 2, 3, 4, 5];

/** Beside the forms of the signed-out pages: a supply main, a return main, and the circuits between them. Ornament only. */
export function LoopOrnament() {
  return (
    <svg viewBox="40 55 550 290" aria-hidden className="mx-auto w-full max-w-4xl" fill="none" strokeWidth={1.5}>
      <path d="M70 320V80H560" stroke="var(--petrol)" strokeWidth={2.5} />
      <path d="M560 320H70" stroke="var(--petrol)" strokeWidth={2.5} strokeDasharray="9 6" />
      <path d="M273 73l14 7-14 7z" fill="var(--petrol)" />
      <path d="M287 313l-14 7 14 7z" fill="var(--petrol)" />
      <g stroke="var(--ink)">
        <circle cx={70} cy={220} r={22} fill="var(--paper)" />
        <path d="M70 198L89 231H51Z" />
      </g>
      {circuits.map((i) => {
        const x = 160 + i * 80;
        return (
          <g key={i} stroke="var(--ink)">
            <path d={`M${x} 80V320`} />
            <rect x={x - 15} y={150} width={30} height={30} fill="var(--paper)" />
            <path d={`M${x - 10} 158l5 14 5-14 5 14 5-14`} />
            <path d={`M${x - 9} 238h18l-18 30h18z`} stroke="var(--brass)" fill="var(--paper)" />
            <circle cx={x} cy={80} r={3} fill="var(--ink)" />
            <circle cx={x} cy={320} r={3} fill="var(--ink)" />
          </g>
        );
      })}
    </svg>
  );
}
