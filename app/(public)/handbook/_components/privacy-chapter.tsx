import { RESTORE_DAYS } from "@/lib/server/sessions/delete-session";
import { ABSOLUTE_DAYS, IDLE_DAYS } from "@/lib/server/auth/lucia";
import type { Chapter } from "./chapter";

export const privacyChapter: Chapter = {
  slug: "privacy",
  title: "Privacy",
  summary: "What is kept, who sees it, and what never leaves the machine Trimwake runs on.",
  sections: [
    {
      id: "kept",
      title: "What is kept",
      body: (
        <ul>
          <li>
            Your name, your e-mail address, your weight if you give it, and a hash of your password, never the
            password.
          </li>
          <li>Every file you upload, as it came, and the figures worked out from it.</li>
          <li>Your gear, your notes, the places you named.</li>
          <li>
            A list of what was changed in your account and when, and of your sign-ins with the kind of device.
          </li>
        </ul>
      ),
    },
    {
      id: "seen",
      title: "Who sees it",
      body: (
        <p>
          Your sessions and your gear are yours alone: no other account sees them. Whoever runs this Trimwake
          can read its disk, as with any service. A track shows where you start and land; think of that before
          you pass a file on.
        </p>
      ),
    },
    {
      id: "outside",
      title: "What goes outside",
      body: (
        <p>
          Nothing is asked of other services while you look at a session: the map’s land is shipped with
          Trimwake and served by it. There are no counters and no advertisers. E-mail for confirming an
          address and for a new password is the exception. If the people who run this Trimwake have chosen
          another map background, your browser fetches that map from its maker.
        </p>
      ),
    },
    {
      id: "cookies",
      title: "Cookies",
      body: (
        <p>
          Two: one that holds your sign-in, which ends after {IDLE_DAYS} days without use and after{" "}
          {ABSOLUTE_DAYS} days in any case, and one that remembers light or dark.
        </p>
      ),
    },
    {
      id: "away",
      title: "Taking things away",
      body: (
        <p>
          A session you delete leaves the log at once and can be brought back for {RESTORE_DAYS} days; then it
          is removed for good, and its file with it once no other session needs it. Closing the whole account
          and an export of everything in one file are not built yet: until then, the people who run this
          Trimwake do it for you.
        </p>
      ),
    },
  ],
};
