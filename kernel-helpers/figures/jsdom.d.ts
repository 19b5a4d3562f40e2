/** The part of jsdom that is used; the package brings no declarations. */
declare module "jsdom" {
  export class VirtualConsole {}
  export class JSDOM {
    constructor(html: string, options: { runScripts: "outside-only"; virtualConsole: VirtualConsole });
    // The window's parts are named where they are used.
    readonly window: unknown;
  }
}
