import { expect, test } from "@playwright/test";
import { newAddress, PASSWORD, signIn, signUp, upload } from "./steps";

test("every page carries the policy headers and private ones are not stored", async ({ page }) => {
  await signUp(page, "Header Rider");
  for (const path of [
    "/",
    "/sign-in",
    "/handbook",
    "/sessions",
    "/quiver",
    "/compare",
    "/upload",
    "/settings",
  ]) {
    const answer = await page.request.get(path);
    const headers = answer.headers();
    expect(headers["content-security-policy"], path).toMatch(/script-src [^;]*'nonce-/);
    expect(headers["content-security-policy"], path).toContain("frame-ancestors 'none'");
    expect(headers["content-security-policy"], path).not.toMatch(/script-src [^;]*unsafe-(inline|eval)/);
    expect(headers["x-content-type-options"], path).toBe("nosniff");
    expect(headers["referrer-policy"], path).toBeTruthy();
    expect(headers["x-powered-by"], path).toBeUndefined();
  }
  expect((await page.request.get("/sessions")).headers()["cache-control"]).toContain("no-store");
});

test("the sign-in cookie is bound to the host, hidden from scripts, and dead after sign-out", async ({
  page,
  context,
}) => {
  const email = await signUp(page, "Cookie Rider");
  const cookie = (await context.cookies()).find((one) => one.name.startsWith("__Host-"));
  expect(cookie).toMatchObject({ secure: true, httpOnly: true, sameSite: "Lax", path: "/" });
  const before = await context.cookies();
  await page
    .locator("summary:visible", { hasText: /Menu|Cookie Rider/ })
    .first()
    .click();
  await page.locator("button:visible", { hasText: "Sign out" }).first().click();
  await page.waitForURL((url) => !url.pathname.startsWith("/sessions"));
  await context.clearCookies();
  await context.addCookies(before);
  await page.goto("/sessions");
  expect(new URL(page.url()).pathname).toBe("/sign-in");
  await signIn(page, email);
});

test("a stranger finds nothing of a session, and nobody signed out does", async ({ page, browser }) => {
  await signUp(page, "Owner Rider");
  await upload(page, ["fixtures/sessions/coast-downs.gpx.gz"]);
  await page.getByRole("link", { name: "Look at the session" }).click();
  await expect(page.getByRole("heading", { name: "Timeline" })).toBeVisible();
  const path = new URL(page.url()).pathname;
  const id = path.split("/").at(-1) ?? "";
  const other = await browser.newContext();
  const stranger = await other.newPage();
  for (const route of [`/api/sessions/${id}/track`, `/api/sessions/${id}/raw`]) {
    expect((await stranger.request.get(route)).status(), `${route} signed out`).toBe(401);
  }
  await signUp(stranger, "Strange Rider");
  for (const route of [path, `/api/sessions/${id}/track`, `/api/sessions/${id}/raw`]) {
    const answer = await stranger.request.get(route);
    expect(answer.status(), route).toBe(404);
    expect(await answer.text()).not.toContain("Owner Rider");
  }
  await other.close();
});

test("an upload from another site or from nobody is refused", async ({ page, request }) => {
  const send = (headers: Record<string, string>) =>
    request.post("/api/uploads", {
      headers: { "content-type": "application/octet-stream", "x-file-name": "a.gpx", ...headers },
      data: "<gpx/>",
    });
  expect((await send({ "sec-fetch-site": "cross-site" })).status()).toBe(404);
  expect((await send({ "sec-fetch-site": "same-origin" })).status()).toBe(401);
  await page.goto("/sign-in?next=//evil.example/x");
  expect(await page.content()).not.toContain('evil.example/x"');
});

test("unknown and known addresses get the same words at sign-in", async ({ page }) => {
  const email = await signUp(page, "Known Rider");
  await page.context().clearCookies();
  const words: string[] = [];
  for (const address of [email, newAddress("nobody")]) {
    await page.goto("/sign-in");
    await page.getByLabel("E-mail address").fill(address);
    await page.getByLabel("Password", { exact: true }).fill(`${PASSWORD} not`);
    await page.locator("main").getByRole("button", { name: "Sign in", exact: true }).click();
    await expect(page.getByText("There is a problem")).toBeVisible();
    words.push(await page.getByRole("alert").first().innerText());
  }
  expect(words[0]).toBe(words[1]);
});
