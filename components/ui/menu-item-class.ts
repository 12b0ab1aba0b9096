/** One line of a menu: a link, or a button inside a form, dressed by this class. */
export const menuItemClass =
  "flex min-h-11 w-full items-center px-3 text-left hover:bg-kelp aria-[current]:font-semibold";
