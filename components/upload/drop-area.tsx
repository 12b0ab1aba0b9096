"use client";

import { useEffect, useRef, useState, type ReactNode } from "react";
import { classNames } from "@/lib/display/class-names";
import { droppedFiles } from "./dropped-files";

const carriesFiles = (event: DragEvent): boolean => event.dataTransfer?.types.includes("Files") === true;

/** Takes files dropped anywhere on the page; the frame round its children shows where they belong. */
export function DropArea({ onFiles, children }: { onFiles: (files: File[]) => void; children: ReactNode }) {
  const [isOver, setIsOver] = useState(false);
  const take = useRef(onFiles);
  useEffect(() => {
    take.current = onFiles;
  }, [onFiles]);
  useEffect(() => {
    // Entering a child leaves its parent: only the balance tells whether the pointer is still on the page.
    let depth = 0;
    const enter = (event: DragEvent) => {
      if (!carriesFiles(event)) return;
      depth += 1;
      setIsOver(true);
    };
    const leave = (event: DragEvent) => {
      if (!carriesFiles(event)) return;
      depth = Math.max(0, depth - 1);
      if (depth === 0) setIsOver(false);
    };
    const over = (event: DragEvent) => {
      if (carriesFiles(event)) event.preventDefault();
    };
    const drop = (event: DragEvent) => {
      if (!carriesFiles(event) || event.dataTransfer === null) return;
      event.preventDefault();
      depth = 0;
      setIsOver(false);
      void droppedFiles(event.dataTransfer).then((files) => {
        take.current(files);
      });
    };
    window.addEventListener("dragenter", enter);
    window.addEventListener("dragleave", leave);
    window.addEventListener("dragover", over);
    window.addEventListener("drop", drop);
    return () => {
      window.removeEventListener("dragenter", enter);
      window.removeEventListener("dragleave", leave);
      window.removeEventListener("dragover", over);
      window.removeEventListener("drop", drop);
    };
  }, []);
  return (
    <div
      className={classNames(
        "border border-dashed px-4 py-5 text-center",
        isOver ? "border-buoy bg-kelp outline-buoy outline-2" : "bg-sheet",
      )}
    >
      {children}
      <p role="status" className="sr-only">
        {isOver ? "Files are over the page. Let go to upload them." : ""}
      </p>
    </div>
  );
}
