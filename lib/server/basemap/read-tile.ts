import { z } from "zod";
import { AppError } from "@/lib/errors/app-error";
import { basemapArchive } from "./basemap";

const whole = z
  .string()
  .regex(/^\d{1,7}$/)
  .transform(Number);
const addressSchema = z
  .strictObject({ stamp: z.string().regex(/^[0-9a-f]{16}$/), z: whole, x: whole, y: whole })
  .refine((tile) => tile.z <= 22 && tile.x < 2 ** tile.z && tile.y < 2 ** tile.z);

/** A tile of land: Mapbox Vector Tile 2.1 bytes, or null for open sea; `current` is false when the stamp is an older archive's. */
export type LandTileAnswer = {
  readonly data: Uint8Array<ArrayBuffer> | null;
  readonly etag: string;
  readonly current: boolean;
};

/**
 * Reads one tile. Anybody may: it is the public shape of the world.
 *
 * @throws AppError `not_found` when there is no such tile in any archive, or the archive is not built yet.
 */
export async function readLandTile(address: Readonly<Record<string, string>>): Promise<LandTileAnswer> {
  const parsed = addressSchema.safeParse(address);
  const archive = parsed.success ? await basemapArchive() : null;
  if (!parsed.success || archive === null || parsed.data.z > archive.maxZoom) {
    throw new AppError("not_found", "There is no such map tile.");
  }
  const { stamp, z: zoom, x, y } = parsed.data;
  return {
    data: await archive.readTile(zoom, x, y),
    etag: `"${archive.stamp}-${zoom}-${x}-${y}"`,
    current: stamp === archive.stamp,
  };
}
