/** Said boldly over a revision that a newer one has replaced. */
export function Superseded({ letter, by }: { letter: string; by: string }) {
  return (
    <div
      role="status"
      className="border-2 border-ruddle bg-ruddle-wash px-4 py-3 text-ruddle print:hidden"
    >
      <p className="font-serif text-figure font-bold">Superseded by revision {by}</p>
      <p className="text-ink">
        Do not cut or build from revision {letter}: a newer one has been issued in its place.
      </p>
    </div>
  );
}
