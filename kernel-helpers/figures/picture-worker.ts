/** Draws pictures in a thread of its own, so that a cell is never held up by the drawing of its figures. */
import { parentPort } from "node:worker_threads";
import { pictureStudio } from "./picture-studio.js";

/** What is asked of the worker. */
export interface PictureOrder {
  readonly id: number;
  readonly data: readonly object[];
  readonly layout: Readonly<Record<string, unknown>>;
}

const studio = pictureStudio();

parentPort?.on("message", ({ id, data, layout }: PictureOrder) => {
  studio
    .then((draw) => draw(data, layout))
    .then(
      (png) => parentPort?.postMessage({ id, png }),
      (cause: unknown) => parentPort?.postMessage({ id, failed: String(cause) }),
    );
});
