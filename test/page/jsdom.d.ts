/** The part of jsdom that tests of pages use; the package brings no declarations. */
declare module "jsdom" {
  export class JSDOM {
    constructor(html: string);
    readonly window: { readonly document: Document };
  }
}
