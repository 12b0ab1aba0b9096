import { LinkButton } from "@/components/ui/link-button";
import { currentUser } from "@/lib/server/auth/current-user";

/** The next thing to do, for a visitor or for somebody already signed in. */
export async function FrontActions() {
  const person = await currentUser();
  return (
    <div className="flex flex-wrap items-center gap-x-6 gap-y-3 lg:justify-end">
      {person ? (
        <LinkButton href="/sessions" look="main">
          Open your sessions
        </LinkButton>
      ) : (
        <>
          <LinkButton href="/sign-up" look="main">
            Start your log
          </LinkButton>
          <LinkButton href="/sign-in">Sign in</LinkButton>
        </>
      )}
      <LinkButton href="/handbook" look="quiet">
        How every figure is worked out
      </LinkButton>
    </div>
  );
}
