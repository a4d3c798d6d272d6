/** The package's own types use import paths without endings, which Node's resolution does not follow. */
declare module 'three-stdlib' {
  import type { Object3D } from 'three';

  export class STLExporter {
    parse(scene: Object3D, options: { binary: true }): DataView;
  }
}
