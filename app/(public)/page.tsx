import type { Metadata } from "next";
import { ExampleSheet } from "@/components/shell/example-sheet";
import { FrontActions } from "./_components/front-actions";
import { FrontCautions, FrontSteps } from "./_components/front-words";

export const metadata: Metadata = {
  title: { absolute: "Trimwake: which setup was faster?" },
  robots: { index: true },
};

export default function FrontPage() {
  return (
    <>
      <header className="grid gap-x-12 gap-y-6 pt-8 pb-8 lg:grid-cols-[minmax(0,3fr)_minmax(0,2fr)] lg:items-end">
        <div>
          <h1 className="text-4xl sm:text-6xl">Which setup was faster?</h1>
          <p className="text-muted mt-4 max-w-2xl text-lg">
            Trimwake is the working log and test bench of people who ride, coach, race and develop hydrofoils
            on open water. It turns a GPS track into what you did on the water, ties it to the gear that was
            bolted together, and shows which setup ran fastest and how far to trust that.
          </p>
        </div>
        <FrontActions />
      </header>
      <ExampleSheet />
      <FrontSteps />
      <FrontCautions />
    </>
  );
}
