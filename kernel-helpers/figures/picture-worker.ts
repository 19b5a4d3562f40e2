/** Worker thread that draws pictures, so that cells do not wait for their figures. */
import { parentPort } from "node:worker_threads";
import { pictureRenderer } from "./picture-renderer.js";

/** A request to the worker. */
export interface PictureRequest {
  readonly id: number;
  readonly data: readonly object[];
  readonly layout: Readonly<Record<string, unknown>>;
}

const renderer = pictureRenderer();

parentPort?.on("message", ({ id, data, layout }: PictureRequest) => {
  renderer
    .then((draw) => draw(data, layout))
    .then(
      (png) => parentPort?.postMessage({ id, png }),
      (cause: unknown) => parentPort?.postMessage({ id, failed: String(cause) }),
    );
});
