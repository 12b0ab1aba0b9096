"use client";

import { useEffect, useRef } from "react";
import { buttonClass } from "@/components/ui/button-class";
import { ACCEPTED_FILES, isTrackName } from "./dropped-files";

/** A real file input behind its label as the button, and one for whole folders where the device has them. */
export function FileChoice({ onFiles }: { onFiles: (files: File[]) => void }) {
  const input = useRef<HTMLInputElement>(null);
  const folder = useRef<HTMLInputElement>(null);
  useEffect(() => {
    // React knows no attribute for choosing folders.
    folder.current?.setAttribute("webkitdirectory", "");
    // Files chosen before this script ran.
    if (input.current !== null) takeFrom(input.current, onFiles);
  }, [onFiles]);
  return (
    <>
      <input
        ref={input}
        id="upload-files"
        name="files"
        type="file"
        multiple
        accept={ACCEPTED_FILES}
        aria-describedby="upload-limits"
        className="peer sr-only [@media(scripting:none)]:not-sr-only"
        onChange={(event) => {
          takeFrom(event.currentTarget, onFiles);
        }}
      />
      <label
        htmlFor="upload-files"
        className={buttonClass(
          "main",
          "normal",
          "px-6 cursor-pointer [@media(scripting:none)]:hidden peer-focus-visible:outline-3 peer-focus-visible:outline-offset-2 peer-focus-visible:outline-buoy",
        )}
      >
        Choose files
      </label>
      <span className="hidden sm:inline [@media(scripting:none)]:hidden">
        <input
          ref={folder}
          id="upload-folder"
          type="file"
          multiple
          className="peer sr-only"
          onChange={(event) => {
            takeFrom(event.currentTarget, (files) => {
              onFiles(files.filter(({ name }) => isTrackName(name)));
            });
          }}
        />
        <label
          htmlFor="upload-folder"
          className={buttonClass(
            "quiet",
            "normal",
            "ml-6 cursor-pointer peer-focus-visible:outline-3 peer-focus-visible:outline-offset-2 peer-focus-visible:outline-buoy",
          )}
        >
          or a folder
        </label>
      </span>
    </>
  );
}

/** Empties the input too, so that the same file can be chosen again. */
function takeFrom(input: HTMLInputElement, onFiles: (files: File[]) => void): void {
  const files = [...(input.files ?? [])];
  if (files.length === 0) return;
  input.value = "";
  onFiles(files);
}
