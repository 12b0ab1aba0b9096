import { mkdtemp, rm, utimes, writeFile } from "node:fs/promises";
import os from "node:os";
import path from "node:path";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { claimBuild } from "./build-claim";

let folder = "";
let file = "";
beforeEach(async () => {
  folder = await mkdtemp(path.join(os.tmpdir(), "claim-"));
  file = path.join(folder, "progress");
});
afterEach(() => rm(folder, { recursive: true, force: true }));

describe("claimBuild", () => {
  it("lets one builder in and the next only after the first is done", async () => {
    const first = await claimBuild(file);
    expect(first).not.toBeNull();
    expect(await claimBuild(file)).toBeNull();
    await first?.release();
    expect(await claimBuild(file)).not.toBeNull();
  });

  it("takes over from a builder that has died", async () => {
    // The largest process id Linux gives is 4194304 (proc(5), pid_max).
    await writeFile(file, "4194305 0.5\n");
    expect(await claimBuild(file)).not.toBeNull();
  });

  it("takes over a claim nobody has renewed for long, though its number lives", async () => {
    await writeFile(file, `${process.pid} 0.5\n`);
    expect(await claimBuild(file)).toBeNull();
    const hourAgo = Date.now() / 1000 - 3600;
    await utimes(file, hourAgo, hourAgo);
    expect(await claimBuild(file)).not.toBeNull();
  });

  it("takes over an unreadable claim", async () => {
    await writeFile(file, "");
    expect(await claimBuild(file)).not.toBeNull();
  });
});
