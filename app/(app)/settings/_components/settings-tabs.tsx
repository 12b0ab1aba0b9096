import { Tabs } from "@/components/ui/tabs";

const PAGES = [
  { href: "/settings", label: "Profile and units" },
  { href: "/settings/email", label: "E-mail address" },
  { href: "/settings/password", label: "Password" },
  { href: "/settings/sign-ins", label: "Sign-ins" },
] as const;

export function SettingsTabs({ current }: { current: (typeof PAGES)[number]["href"] }) {
  return (
    <Tabs
      label="Settings pages"
      className="mb-8"
      tabs={PAGES.map((page) => ({ ...page, current: page.href === current }))}
    />
  );
}
