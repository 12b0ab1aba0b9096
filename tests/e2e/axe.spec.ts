import AxeBuilder from "@axe-core/playwright";
import { expect, test, type Page } from "@playwright/test";
import { addPart, addSetup, signUp, upload } from "./steps";

const TAGS = ["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa", "best-practice"];

async function expectClean(page: Page, where: string): Promise<void> {
  await page.waitForLoadState("networkidle");
  const { violations } = await new AxeBuilder({ page }).withTags(TAGS).analyze();
  const lines = violations.map(
    (one) => `${one.id}: ${one.nodes.map((node) => node.target.join(" ")).join(", ")}`,
  );
  expect(lines, where).toEqual([]);
}

const PUBLIC = [
  "/",
  "/sign-in",
  "/sign-up",
  "/forgotten-password",
  "/check-your-mail",
  "/handbook",
  "/nowhere",
];

for (const colorScheme of ["light", "dark"] as const) {
  test.describe(`in ${colorScheme}`, () => {
    test.use({ colorScheme });

    test("public pages have no accessibility violation", async ({ page }) => {
      for (const path of PUBLIC) {
        await page.goto(path);
        await expectClean(page, path);
      }
      await page.goto("/handbook");
      for (const href of await page
        .locator('main a[href^="/handbook/"]')
        .evaluateAll((links) => [
          ...new Set(links.map((link) => new URL((link as HTMLAnchorElement).href).pathname)),
        ])) {
        await page.goto(href);
        await expectClean(page, href);
      }
      await page.goto("/sign-up");
      await page.getByRole("button", { name: "Make an account" }).click();
      await expect(page.getByText("There is a problem")).toBeVisible();
      await expectClean(page, "/sign-up refused");
    });

    test("signed-in pages have none, empty and filled", async ({ page }) => {
      await signUp(page, "Axe Rider");
      for (const path of ["/sessions", "/quiver", "/compare", "/upload", "/quiver/setups/new"]) {
        await page.goto(path);
        await expectClean(page, `${path} empty`);
      }
      await addPart(page, "front_wing", {
        maker: "Aldervane",
        model: "Long-rail 850",
        area: "900",
        span: "850",
      });
      await addPart(page, "rear_wing", { maker: "Morrowkeel", model: "Rear 45", area: "128", span: "360" });
      await addSetup(page, "Long rail");
      await upload(page, ["fixtures/sessions/downwind.gpx.gz"]);
      await expectClean(page, "/upload done");
      await page.getByRole("link", { name: "Look at the session" }).click();
      await expect(page.getByRole("heading", { name: "Timeline" })).toBeVisible();
      await expectClean(page, "session");
      for (const path of ["/sessions", "/sessions?discipline=wing&from=2030-01-01", "/compare", "/quiver"]) {
        await page.goto(path);
        await expectClean(page, path);
      }
      await page.goto("/quiver/parts/new?kind=mast");
      await expectClean(page, "new part");
      await page.getByRole("button", { name: "Add to the quiver" }).click();
      await expect(page.getByText("There is a problem")).toBeVisible();
      await expectClean(page, "new part refused");
      for (const path of ["/settings", "/settings/password", "/settings/sign-ins", "/settings/email"]) {
        await page.goto(path);
        await expectClean(page, path);
      }
    });
  });
}
