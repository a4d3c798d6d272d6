/** The part of the Khronos Group's validator that the tests use; it has no types of its own. */
declare module 'gltf-validator' {
  interface Report {
    readonly issues: {
      readonly numErrors: number;
      readonly numWarnings: number;
      readonly numInfos: number;
      readonly numHints: number;
      readonly messages: readonly { readonly code: string; readonly message: string; readonly pointer?: string }[];
    };
    readonly info: { readonly totalTriangleCount: number };
  }
  export function validateBytes(bytes: Uint8Array): Promise<Report>;
}
