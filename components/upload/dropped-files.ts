const TRACK_NAME = /\.(gpx|tcx|kml|fit|gz|zip)$/i;

/** What the file chooser offers first; the bytes decide, not the name. */
export const ACCEPTED_FILES = ".gpx,.tcx,.kml,.fit,.gz,.zip,application/gpx+xml";

/** Out of a folder only what is called like a track is taken; files chosen one by one are all tried. */
export function isTrackName(name: string): boolean {
  return TRACK_NAME.test(name) && !name.startsWith(".");
}

/** The files of a drop, those inside dropped folders too. Call it within the event: the list is gone afterwards. */
export async function droppedFiles(transfer: DataTransfer): Promise<File[]> {
  const entries = [...transfer.items]
    .filter((item) => item.kind === "file")
    .map((item) => ({ entry: item.webkitGetAsEntry(), file: item.getAsFile() }));
  const found = await Promise.all(
    entries.map(async ({ entry, file }) => {
      if (entry?.isDirectory === true) return filesInside(entry as FileSystemDirectoryEntry);
      return file === null ? [] : [file];
    }),
  );
  return found.flat();
}

async function filesInside(folder: FileSystemDirectoryEntry): Promise<File[]> {
  const found: File[] = [];
  for (const entry of await listFolder(folder)) {
    if (entry.isDirectory) found.push(...(await filesInside(entry as FileSystemDirectoryEntry)));
    else if (isTrackName(entry.name)) {
      found.push(
        await new Promise<File>((resolve, reject) => {
          (entry as FileSystemFileEntry).file(resolve, reject);
        }),
      );
    }
  }
  return found;
}

/** A folder is listed in portions until one is empty. */
async function listFolder(folder: FileSystemDirectoryEntry): Promise<FileSystemEntry[]> {
  const reader = folder.createReader();
  const all: FileSystemEntry[] = [];
  for (;;) {
    const portion = await new Promise<FileSystemEntry[]>((resolve, reject) => {
      reader.readEntries(resolve, reject);
    });
    if (portion.length === 0) return all;
    all.push(...portion);
  }
}
