/** Stands in while a section is read: the same three parts, empty. */
export function ScoreSkeleton() {
  return (
    <div className="mx-auto grid max-w-[120rem] gap-4 px-4 py-4 md:px-6" aria-busy="true">
      <p className="sr-only" role="status">
        Opening the section
      </p>
      <div className="h-7 w-2/3 bg-rule/50" />
      <div className="h-12 border-y border-rule" />
      <div className="h-[45vh] bg-rule/30" />
      <div className="h-24 border-t border-rule" />
    </div>
  );
}
