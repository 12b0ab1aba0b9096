import { Notice } from "@/components/ui/notice";

const TEXTS: Readonly<Record<string, string>> = {
  part: "The part is in your quiver.",
  setup: "The setup is in your quiver.",
  "part-retired": "The part is retired. Sessions ridden with it keep it.",
  "setup-retired": "The setup is retired. Sessions ridden with it keep it.",
};

/** Says what the last form did; nothing for an unknown word in the URL. */
export function SavedNotice({ saved }: { saved: string | string[] | undefined }) {
  const text = typeof saved === "string" ? TEXTS[saved] : undefined;
  return text === undefined ? null : <Notice kind="done">{text}</Notice>;
}
