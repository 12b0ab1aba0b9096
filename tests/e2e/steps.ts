import { expect, type Page } from "@playwright/test";

export const PASSWORD = "gusty evening off the pier";

let made = 0;

/** A fresh address for each account: tests share one server. */
export function newAddress(name: string): string {
  made += 1;
  return `${name}-${Date.now()}-${made}@riders.example`;
}

/** The newest link of a kind in the outbox for an address. */
export async function linkFromOutbox(page: Page, email: string, path: "confirm" | "reset"): Promise<string> {
  await page.goto("/dev/outbox");
  const message = page
    .getByRole("listitem")
    .filter({ hasText: email })
    .filter({ hasText: `/${path}?token=` })
    .first();
  const text = await message.innerText();
  const found = new RegExp(`/${path}\\?token=[\\w-]+`).exec(text);
  expect(found, `a ${path} link for the address`).not.toBeNull();
  return found?.[0] ?? "";
}

/** Makes an account through the page and confirms it; ends signed in on the log. */
export async function signUp(page: Page, name: string): Promise<string> {
  const email = newAddress(name.toLowerCase().replaceAll(" ", "-"));
  await page.goto("/sign-up");
  await page.getByLabel("Name").fill(name);
  await page.getByLabel("E-mail address").fill(email);
  await page.getByLabel("Password", { exact: true }).fill(PASSWORD);
  await page.getByRole("button", { name: "Make an account" }).click();
  await page.waitForURL((url) => url.pathname !== "/sign-up");
  await page.goto(await linkFromOutbox(page, email, "confirm"));
  await page
    .locator("main")
    .getByRole("button", { name: /confirm/i })
    .click();
  await page.waitForLoadState();
  await signIn(page, email);
  return email;
}

/** Signs in unless the browser already is; ends on the log. */
export async function signIn(page: Page, email: string, password = PASSWORD): Promise<void> {
  await page.goto("/sessions");
  if (new URL(page.url()).pathname === "/sign-in") {
    await page.getByLabel("E-mail address").fill(email);
    await page.getByLabel("Password", { exact: true }).fill(password);
    await page.locator("main").getByRole("button", { name: "Sign in", exact: true }).click();
  }
  await page.waitForURL("**/sessions");
  await expect(page.getByRole("heading", { level: 1 })).toHaveText("Sessions");
}

/** Adds a part through the form. */
export async function addPart(
  page: Page,
  kind: "front_wing" | "rear_wing",
  part: { maker: string; model: string; area: string; span: string },
): Promise<void> {
  await page.goto(`/quiver/parts/new?kind=${kind}`);
  await page.getByLabel("Maker").fill(part.maker);
  await page.getByLabel("Model").fill(part.model);
  await page.getByLabel("Area").fill(part.area);
  await page.getByLabel("Span").fill(part.span);
  await page.getByRole("button", { name: "Add to the quiver" }).click();
  await page.waitForURL("**/quiver?saved=part");
}

/** Adds a setup on the first front and rear wing of the quiver. */
export async function addSetup(page: Page, name: string, shim = ""): Promise<void> {
  await page.goto("/quiver/setups/new");
  await page.getByLabel("Name").fill(name);
  await page.getByLabel("Front wing").selectOption({ index: 1 });
  await page.getByLabel("Rear wing", { exact: false }).first().selectOption({ index: 1 });
  await page.getByLabel("Shim under the rear wing").fill(shim);
  await page.getByRole("button", { name: "Add setup" }).click();
  await page.waitForURL("**/quiver?saved=setup");
}

export type SentFile = { name: string; mimeType: string; buffer: Buffer };

/** Sends files by the chooser and waits until each has its verdict. */
export async function upload(page: Page, files: string[] | SentFile[]): Promise<void> {
  await page.goto("/upload");
  await page.locator('input[type="file"]').first().setInputFiles(files);
  const rows = page.getByRole("list", { name: "Files" }).locator("> li");
  await expect(rows).toHaveCount(files.length);
  await expect(async () => {
    const busy = await page.getByRole("progressbar").count();
    expect(busy).toBe(0);
    const words = await rows.allInnerTexts();
    for (const text of words) expect(text).not.toMatch(/waiting|sent$|reading/m);
  }).toPass({ timeout: 60_000 });
}
