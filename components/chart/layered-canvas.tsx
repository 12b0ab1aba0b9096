"use client";

import { useEffect, useLayoutEffect, useRef, useState, type PointerEvent } from "react";
import { flushSync } from "react-dom";
import { useTheme } from "@/components/ui/use-theme";
import { themeTokens, type Theme, type ThemeTokens } from "@/lib/display/theme-tokens";
import type { TimeCursor } from "@/lib/display/time-cursor";

/** What a drawing needs: the context in CSS pixels, the size, the colours. */
export type Surface = {
  readonly context: CanvasRenderingContext2D;
  readonly width: number;
  readonly height: number;
  readonly tokens: ThemeTokens;
  readonly theme: Theme;
};

export type LayeredCanvasProps = {
  height: number;
  /** Named for those who cannot see it; `description` says what is drawn. */
  label: string;
  description: string;
  cursor: TimeCursor;
  /** Draws what stands still; called again when it or the size or the theme changes. Keep its identity stable. */
  drawStill: (surface: Surface) => void;
  /** Draws what moves with the cursor; called on every move, on its own layer. */
  drawMoving: (surface: Surface, timeMs: number | null) => void;
  onPointer?: (event: PointerEvent<HTMLDivElement>, xPx: number, width: number) => void;
  onWidth?: (width: number) => void;
};

function prepare(
  canvas: HTMLCanvasElement | null,
  width: number,
  height: number,
): CanvasRenderingContext2D | null {
  const context = canvas?.getContext("2d") ?? null;
  if (canvas === null || context === null || width === 0) return null;
  const ratio = Math.min(2, window.devicePixelRatio || 1);
  if (canvas.width !== Math.round(width * ratio) || canvas.height !== Math.round(height * ratio)) {
    canvas.width = Math.round(width * ratio);
    canvas.height = Math.round(height * ratio);
  }
  context.setTransform(ratio, 0, 0, ratio, 0, 0);
  context.clearRect(0, 0, width, height);
  return context;
}

/** The theme to draw in: the page's own, and the light one while it is being printed. */
export function useDrawnTheme(): Theme {
  const theme = useTheme();
  const [isPrinting, setPrinting] = useState(false);
  useEffect(() => {
    // The browser takes its picture of the page as soon as the event returns: no later render counts.
    const before = () => flushSync(() => setPrinting(true));
    const after = () => setPrinting(false);
    window.addEventListener("beforeprint", before);
    window.addEventListener("afterprint", after);
    return () => {
      window.removeEventListener("beforeprint", before);
      window.removeEventListener("afterprint", after);
    };
  }, []);
  return isPrinting ? "light" : theme;
}

/**
 * Two canvases over each other: the lower is drawn once, the upper follows the cursor without rendering the page,
 * so that a long session scrubs smoothly. Vertical swipes stay with the page.
 */
export function LayeredCanvas(props: LayeredCanvasProps) {
  const { height, label, description, cursor, drawStill, drawMoving, onPointer, onWidth } = props;
  const box = useRef<HTMLDivElement>(null);
  const still = useRef<HTMLCanvasElement>(null);
  const moving = useRef<HTMLCanvasElement>(null);
  const [width, setWidth] = useState(0);
  const theme = useDrawnTheme();

  useEffect(() => {
    const element = box.current;
    if (element === null) return;
    const observer = new ResizeObserver(([entry]) => {
      const wide = Math.floor(entry?.contentRect.width ?? 0);
      setWidth(wide);
      onWidth?.(wide);
    });
    observer.observe(element);
    return () => observer.disconnect();
  }, [onWidth]);

  useLayoutEffect(() => {
    const context = prepare(still.current, width, height);
    if (context !== null) drawStill({ context, width, height, tokens: themeTokens(theme), theme });
  }, [drawStill, width, height, theme]);

  useEffect(() => {
    let frame = 0;
    const draw = () => {
      frame = 0;
      const context = prepare(moving.current, width, height);
      if (context !== null)
        drawMoving({ context, width, height, tokens: themeTokens(theme), theme }, cursor.get());
    };
    const ask = () => {
      if (frame === 0) frame = requestAnimationFrame(draw);
    };
    ask();
    const end = cursor.subscribe(ask);
    return () => {
      end();
      cancelAnimationFrame(frame);
    };
  }, [drawMoving, cursor, width, height, theme]);

  const pointer = (event: PointerEvent<HTMLDivElement>) => {
    if (onPointer === undefined) return;
    onPointer(event, event.clientX - event.currentTarget.getBoundingClientRect().left, width);
  };
  return (
    <div
      ref={box}
      role="img"
      aria-label={`${label}. ${description}`}
      className="relative w-full touch-pan-y select-none print:break-inside-avoid"
      style={{ height }}
      onPointerDown={pointer}
      onPointerMove={pointer}
      onPointerUp={pointer}
      onPointerCancel={pointer}
    >
      <canvas ref={still} className="absolute inset-0 size-full" />
      <canvas ref={moving} className="absolute inset-0 size-full" />
    </div>
  );
}
