import type { Field } from "./option.js";
import type { Role } from "./rule-names.js";

/** Names and places that lead to a value inside the options of a call: `noise`, `N`, `sd`. */
export type Path = readonly (string | number)[];

/** What is wrong with the options of a call. */
export type Fault =
  | {
      readonly kind: "wrong";
      readonly path: Path;
      /** What the value must be, as after "must be". */
      readonly must: string;
      readonly value: unknown;
      /** What could stand there instead. */
      readonly instead: unknown;
    }
  | {
      readonly kind: "unknown";
      /** Of the object that has the field. */
      readonly path: Path;
      readonly name: string;
      readonly value: unknown;
      readonly known: Readonly<Record<string, Field>>;
    }
  | {
      readonly kind: "missing";
      readonly path: Path;
      /** One of these. */
      readonly fields: Readonly<Record<string, Field>>;
      /** A value of the first of them. */
      readonly instead: unknown;
    }
  | {
      readonly kind: "stranger";
      /** Of the object, or of the text itself, that has the name. */
      readonly path: Path;
      readonly name: string;
      readonly role: Role;
      readonly known: readonly string[];
      /** Whether the name is a key. */
      readonly isKey: boolean;
    }
  | { readonly kind: "both"; readonly path: Path; readonly names: readonly string[] };
