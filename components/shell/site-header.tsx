import Link from "next/link";
import { LinkButton } from "@/components/ui/link-button";
import { Menu } from "@/components/ui/menu";
import { menuItemClass } from "@/components/ui/menu-item-class";
import { NavLink } from "./nav-link";
import { WakeMark } from "./wake-mark";

const PLACES = [
  { href: "/sessions", label: "Sessions" },
  { href: "/quiver", label: "Quiver" },
  { href: "/compare", label: "Compare" },
] as const;

export const UPLOAD_PATH = "/upload";

export type SiteHeaderProps = {
  /** The signed-in person, or null on public pages for visitors. */
  person: { readonly name: string } | null;
  signOut: () => Promise<void>;
};

/** One bar of ink rule: the mark, the places, the upload, the person. Sticks nowhere. */
export function SiteHeader({ person, signOut }: SiteHeaderProps) {
  return (
    <header className="border-ink no-print border-b">
      <div className="page flex min-h-16 flex-wrap items-center gap-x-4 gap-y-2 py-2 whitespace-nowrap lg:gap-x-8">
        <Link
          href={person ? "/sessions" : "/"}
          className="flex min-h-11 items-center gap-2 text-lg font-bold [font-stretch:125%]"
        >
          <WakeMark className="max-[22rem]:hidden" />
          Trimwake
        </Link>
        {person ? <SignedIn person={person} signOut={signOut} /> : <Visitor />}
      </div>
    </header>
  );
}

function SignedIn({ person, signOut }: { person: { readonly name: string }; signOut: () => Promise<void> }) {
  return (
    <>
      <nav aria-label="Main" className="hidden flex-1 md:block">
        <ul className="flex gap-4 lg:gap-6">
          {PLACES.map((place) => (
            <li key={place.href}>
              <NavLink href={place.href} className="mark-current inline-flex min-h-9 items-center">
                {place.label}
              </NavLink>
            </li>
          ))}
        </ul>
      </nav>
      <div className="ml-auto flex items-center gap-4 lg:gap-6">
        <div className="hidden md:block">
          <LinkButton href={UPLOAD_PATH} look="main">
            Upload tracks
          </LinkButton>
        </div>
        <Menu
          className="hidden md:block"
          label={
            <>
              <span className="max-w-24 truncate lg:max-w-48">{person.name}</span>
              <span className="sr-only">, your menu</span>
            </>
          }
        >
          <PersonLinks signOut={signOut} />
        </Menu>
        {/* On the beach the upload is what a phone is taken out for. */}
        <div className="md:hidden">
          <LinkButton href={UPLOAD_PATH} look="main">
            Upload
          </LinkButton>
        </div>
        <Menu label="Menu" className="md:hidden">
          <nav aria-label="Main">
            <ul>
              {PLACES.map((place) => (
                <li key={place.href}>
                  <NavLink href={place.href} className={menuItemClass}>
                    {place.label}
                  </NavLink>
                </li>
              ))}
            </ul>
          </nav>
          <p className="border-hairline text-muted mt-2 max-w-64 truncate border-t px-3 pt-3 text-sm">
            {person.name}
          </p>
          <PersonLinks signOut={signOut} />
        </Menu>
      </div>
    </>
  );
}

function PersonLinks({ signOut }: { signOut: () => Promise<void> }) {
  return (
    <>
      <NavLink href="/settings" className={menuItemClass}>
        Settings
      </NavLink>
      <NavLink href="/handbook" className={menuItemClass}>
        Handbook
      </NavLink>
      <form action={signOut}>
        <button type="submit" className={menuItemClass}>
          Sign out
        </button>
      </form>
    </>
  );
}

function Visitor() {
  return (
    <nav aria-label="Main" className="ml-auto">
      <ul className="flex items-center gap-x-4 sm:gap-x-6">
        <li className="hidden sm:block">
          <NavLink href="/handbook" className="mark-current inline-flex min-h-11 items-center">
            Handbook
          </NavLink>
        </li>
        <li>
          <NavLink href="/sign-in" className="mark-current inline-flex min-h-11 items-center">
            Sign in
          </NavLink>
        </li>
        <li>
          <LinkButton href="/sign-up" look="main">
            Sign up
          </LinkButton>
        </li>
      </ul>
    </nav>
  );
}
