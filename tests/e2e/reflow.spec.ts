import { expect, test } from "@playwright/test";
import { signUp, upload } from "./steps";

test("no page scrolls sideways at 320 px, which is 1280 px at four times the size", async ({ page }) => {
  await page.setViewportSize({ width: 320, height: 720 });
  await signUp(page, "Narrow Rider");
  await upload(page, ["fixtures/sessions/wing.gpx.gz"]);
  await page.getByRole("link", { name: "Look at the session" }).click();
  await expect(page.getByRole("heading", { name: "Timeline" })).toBeVisible();
  const session = new URL(page.url()).pathname;
  const paths = [
    "/",
    "/handbook",
    "/sessions",
    "/quiver",
    "/quiver/parts/new",
    "/compare",
    "/upload",
    "/settings",
    session,
  ];
  for (const path of paths) {
    await page.goto(path);
    const over = () =>
      page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
    expect(await over(), path).toBeLessThanOrEqual(0);
  }
});
