import Link from "next/link";

/** Page by page, as links; `hrefOf` keeps the filters of the address. */
export function Pagination({
  page,
  pages,
  hrefOf,
  label = "Pages",
}: {
  page: number;
  pages: number;
  hrefOf: (page: number) => string;
  label?: string;
}) {
  if (pages <= 1) return null;
  const step = "mark-current inline-flex min-h-11 items-center font-semibold";
  return (
    <nav aria-label={label} className="no-print flex flex-wrap items-center gap-x-6 gap-y-2">
      {page > 1 && (
        <Link href={hrefOf(page - 1)} rel="prev" className={step}>
          Previous page
        </Link>
      )}
      <span>
        Page <span className="num">{page}</span> of <span className="num">{pages}</span>
      </span>
      {page < pages && (
        <Link href={hrefOf(page + 1)} rel="next" className={step}>
          Next page
        </Link>
      )}
    </nav>
  );
}
