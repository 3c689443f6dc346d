/** The frame of the page while the drawing is read. */
export default function LoadingDrawing() {
  return (
    <main className="flex flex-1 items-center justify-center" aria-busy>
      <p role="status" className="text-quiet">
        Opening the drawing…
      </p>
    </main>
  );
}
