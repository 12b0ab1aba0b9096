import { uuidv7 } from "uuidv7";

/** A fresh sortable random id. Source: RFC 9562, section 5.7 (UUID version 7). */
export function newId(): string {
  return uuidv7();
}
