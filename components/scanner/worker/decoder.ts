/** zxing-cpp compiled to WebAssembly, called on grey pictures; the memory it reads from is kept and reused. */
import {
  BINARIZERS,
  encodeFormats,
  prepareZXingModule,
  TEXT_MODES,
  type Binarizer,
} from "zxing-wasm/reader";
import type { Grey } from "./grey";

type Corner = { x: number; y: number };
/** A symbol that was read (`text`), or only found (`text` null). */
export type Found = { text: string | null; corners: readonly Corner[] };

export type DecodeOptions = {
  binarizer: Binarizer;
  /** Tries harder to find the symbol: slower. */
  harder: boolean;
  /** Dark paper, light ink. */
  inverted?: boolean;
  /** Closes holes in modules first. */
  closing?: boolean;
};

export type Decoder = (grey: Grey, options: DecodeOptions) => Found[];

type Vector = { size(): number; get(at: number): NativeResult | undefined; delete(): void };
type NativeResult = {
  isValid: boolean;
  text: string;
  position: { topLeft: Corner; topRight: Corner; bottomRight: Corner; bottomLeft: Corner };
};
/** What of the module is called here. */
type Native = {
  HEAPU8: Uint8Array;
  _malloc(bytes: number): number;
  _free(at: number): void;
  readBarcodesFromPixmap(at: number, width: number, height: number, options: object): Vector;
};

/**
 * Starts the module.
 *
 * @param wasm the bytes of zxing_reader.wasm of the very version that the glue is of
 * @throws what WebAssembly throws, for instance a CompileError under a policy that forbids it
 */
export async function startDecoder(wasm: ArrayBuffer): Promise<Decoder> {
  const native = (await prepareZXingModule({
    // Its own way is a download from somebody else's server.
    overrides: { wasmBinary: wasm },
    fireImmediately: true,
  })) as unknown as Native;
  let [memory, held] = [0, 0];

  return (grey, options) => {
    const bytes = grey.width * grey.height;
    if (bytes > held) {
      if (memory) native._free(memory);
      memory = native._malloc(bytes);
      held = memory ? bytes : 0;
      if (!memory) throw new RangeError(`no memory for ${bytes} pixels`);
    }
    native.HEAPU8.set(grey.data, memory);
    const results = native.readBarcodesFromPixmap(memory, grey.width, grey.height, {
      // Model 2 alone: micro symbols correct so little that noise can look like one.
      formats: encodeFormats(["QRCodeModel2"]),
      tryHarder: options.harder,
      tryRotate: options.harder,
      tryInvert: options.inverted ?? false,
      tryDownscale: options.harder,
      tryDenoise: options.closing ?? false,
      binarizer: BINARIZERS.indexOf(options.binarizer),
      isPure: false,
      downscaleFactor: 3,
      downscaleThreshold: 500,
      minLineCount: 2,
      maxNumberOfSymbols: 4,
      validateOptionalChecksum: false,
      returnErrors: true,
      eanAddOnSymbol: 0,
      textMode: TEXT_MODES.indexOf("Plain"),
      characterSet: 0,
      tryCode39ExtendedMode: false,
    });
    try {
      const found: Found[] = [];
      for (let at = 0; at < results.size(); at += 1) {
        const result = results.get(at);
        if (!result) continue;
        const { topLeft, topRight, bottomRight, bottomLeft } = result.position;
        found.push({
          text: result.isValid && result.text !== "" ? result.text : null,
          corners: [topLeft, topRight, bottomRight, bottomLeft],
        });
      }
      return found;
    } finally {
      results.delete();
    }
  };
}
