declare module "vt-pbf" {
  export function fromGeojsonVt(
    layers: Readonly<Record<string, { features: readonly unknown[] }>>,
    options: { readonly version: number; readonly extent: number },
  ): Uint8Array;
}
