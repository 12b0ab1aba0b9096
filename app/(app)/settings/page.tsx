import type { Metadata } from "next";
import { themeChoice } from "@/app/theme-choice";
import { PageHeader } from "@/components/ui/page-header";
import { Section } from "@/components/ui/section";
import { requireUser } from "@/lib/server/auth/current-user";
import { ProfileForm } from "./_components/profile-form";
import { SettingsTabs } from "./_components/settings-tabs";
import { ThemeForm } from "./_components/theme-form";
import { UnitsForm } from "./_components/units-form";
import { updateProfileAction, updateThemeAction, updateUnitsAction } from "./actions";

export const metadata: Metadata = { title: "Settings" };

export default async function SettingsPage() {
  const person = await requireUser("/settings");
  const weight = person.weightKg === null ? "" : String(person.weightKg);
  return (
    <>
      <PageHeader title="Settings" />
      <SettingsTabs current="/settings" />
      <Section id="profile" title="Profile" reading="Only you see it.">
        <ProfileForm act={updateProfileAction} name={person.name} weight={weight} />
      </Section>
      <Section id="units" title="Units" reading="How speeds and distances read on every page and in exports.">
        <UnitsForm act={updateUnitsAction} {...person.units} />
      </Section>
      <Section id="colours" title="Colours" reading="Dark paper for the evening, light paper for sunlight.">
        <ThemeForm act={updateThemeAction} theme={await themeChoice()} />
      </Section>
    </>
  );
}
