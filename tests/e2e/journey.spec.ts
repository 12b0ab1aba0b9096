import { existsSync, readdirSync } from "node:fs";
import path from "node:path";
import { expect, test } from "@playwright/test";
import { addPart, addSetup, signUp, upload } from "./steps";

const FRONT = { maker: "Aldervane", model: "Long-rail 850", area: "900", span: "850" };
const REAR = { maker: "Morrowkeel", model: "Rear 45", area: "128", span: "360" };

test("from sign-up to which setup ran fastest", async ({ page }) => {
  await signUp(page, "Runa Strand");
  await expect(page.getByText("No session in your log yet")).toBeVisible();

  await addPart(page, "front_wing", FRONT);
  await addPart(page, "rear_wing", REAR);
  await addSetup(page, "Long rail");
  await page.getByRole("link", { name: "Copy Long rail and change one thing" }).click();
  await expect(page.getByRole("heading", { level: 1 })).toHaveText("Copy and change one thing");
  await page.getByLabel("Name").fill("Half shim");
  await page.getByLabel("Shim under the rear wing").fill("0,5");
  await page.getByRole("button", { name: "Add setup" }).click();
  await expect(page.getByRole("cell", { name: "+½° shim" })).toBeVisible();

  await upload(page, ["fixtures/sessions/downwind.gpx.gz"]);
  await page.getByLabel("Setup").selectOption({ label: "Long rail" });
  await page.getByRole("button", { name: "Put Long rail on the session above" }).click();
  await expect(page.getByRole("button", { name: "Put Long rail on the session above" })).toHaveCount(0);
  await upload(page, ["fixtures/sessions/coast-downs.gpx.gz"]);
  await expect(page.getByText("Same as last time.")).toBeVisible();
  await page.getByLabel("Setup").selectOption({ label: "Half shim" });
  await page.getByRole("button", { name: "Put Half shim on the session above" }).click();
  await expect(page.getByRole("button", { name: "Put Half shim on the session above" })).toHaveCount(0);

  await page.goto("/compare");
  for (const name of ["Long rail", "Half shim"]) {
    await expect(page.getByRole("rowheader", { name })).toBeVisible();
  }
  await page.getByRole("link", { name: "Shims" }).click();
  await expect(page.getByRole("rowheader", { name: "no shim" })).toBeVisible();
  await expect(page.getByText("What this cannot say")).toBeVisible();
});

test("every file gets a verdict in words", async ({ page }) => {
  await signUp(page, "Many Files");
  await upload(page, [
    {
      name: "holiday.gpx",
      mimeType: "application/gpx+xml",
      buffer: Buffer.from([0xff, 0xd8, 0xff, 0xe0, 1, 2]),
    },
    {
      name: "plan.gpx",
      mimeType: "application/gpx+xml",
      buffer: Buffer.from('<gpx version="1.1"><rte><rtept lat="57" lon="9"/></rte></gpx>'),
    },
    { name: "empty.gpx", mimeType: "application/gpx+xml", buffer: Buffer.alloc(0) },
  ]);
  const rows = page.getByRole("list", { name: "Files" }).locator("> li");
  for (const text of await rows.allInnerTexts()) expect(text).toMatch(/not read[\s\S]+\.$/m);
  await upload(page, [
    "fixtures/gpx/31_08_2019.gpx",
    "fixtures/gpx/run.gpx",
    "fixtures/tcx/two-laps.tcx",
    "fixtures/archive/two-sessions.zip",
  ]);
  await expect(rows.filter({ hasText: "two-sessions.zip" })).toContainText("2 of 3 read");
  await expect(rows.filter({ hasText: "31_08_2019.gpx" })).toContainText("read");
  await upload(page, ["fixtures/gpx/31_08_2019.gpx"]);
  await expect(rows.first()).toContainText("in your log");
  await page.goto("/sessions");
  await expect(page.getByText("Sessions", { exact: true }).last()).toBeVisible();
});

test("a session is scrubbed, brushed, described, deleted and brought back", async ({ page }) => {
  await signUp(page, "Careful Rider");
  await upload(page, ["fixtures/sessions/downwind.gpx.gz"]);
  await page.getByRole("link", { name: "Look at the session" }).click();
  const scrubber = page.getByRole("slider", { name: "Moment of the session" });
  await expect(scrubber).toBeVisible();
  await scrubber.focus();
  const before = await scrubber.getAttribute("aria-valuetext");
  await page.keyboard.press("PageUp");
  await expect(scrubber).not.toHaveAttribute("aria-valuetext", before ?? "");
  await page.keyboard.press("End");
  await expect(scrubber).toHaveAttribute("aria-valuetext", /kn$/);

  await page
    .getByRole("table", { name: /On-foil segments/ })
    .getByRole("button")
    .first()
    .click();
  await expect(page.getByText(/worked out again/).first()).toBeVisible();
  await page.getByRole("button", { name: "Whole session" }).first().click();
  await expect(page.getByText(/worked out again/)).toHaveCount(0);

  await page.getByText("Details and conditions", { exact: true }).click();
  await page.getByLabel("Title").fill("Evening run");
  await page.getByLabel("Wind from").fill("WSW");
  await page.getByLabel("Wind speed").fill("17,5");
  await page.getByRole("button", { name: "Save details" }).click();
  await expect(page.getByRole("heading", { level: 1 })).toHaveText("Evening run");
  await expect(page.getByText(/Wind 17\.5.kn from WSW/)).toBeVisible();

  const path = new URL(page.url()).pathname;
  await page.getByRole("button", { name: "Delete" }).first().click();
  await expect(page.getByText(/can be brought back until/)).toBeVisible();
  await page.goto("/sessions");
  await expect(page.getByText("No session in your log yet")).toBeVisible();
  await page.goto(path);
  await page.getByRole("button", { name: "Bring it back" }).click();
  await expect(page.getByRole("slider", { name: "Moment of the session" })).toBeVisible();
});

test("recorded tracks of other water and of land give no time on foil", async ({ page }) => {
  const folder = path.resolve("../shared/practice/real");
  test.skip(!existsSync(folder), "the folder of recorded tracks is not here");
  const names = readdirSync(folder).filter((name) => !name.endsWith(".json"));
  await signUp(page, "Sceptical Rider");
  await upload(
    page,
    names.map((name) => path.join(folder, name)),
  );
  const rows = page.getByRole("list", { name: "Files" }).locator("> li");
  for (const text of await rows.allInnerTexts()) expect(text).not.toContain("not read");
  await page.goto("/sessions");
  const onFoil = page.locator("dl").filter({ hasText: "Time on foil" }).first();
  await expect(onFoil).toContainText("0:00:00");
});
