import type { Mesh } from '../../print/mesh.ts';
import { FileError, type FileErrorCode } from '../file-error.ts';
import type { Transform } from './transform.ts';

/** What a model part holds, as it says it: its own unit, nothing resolved. */
export interface ModelPart {
  unit: string;
  readonly metadata: Map<string, string>;
  readonly objects: Map<number, ObjectResource>;
  readonly items: Placement[];
}

export interface ObjectResource {
  readonly id: number;
  readonly name: string;
  readonly partNumber: string;
  readonly type: string;
  /** Either a mesh or parts from other objects. */
  readonly body: Mesh | readonly Placement[];
}

/** An object put somewhere: a build item or a component. */
export interface Placement {
  readonly object: ObjectResource;
  readonly transform: Transform;
}

export const isMesh = (body: ObjectResource['body']): body is Mesh => 'positions' in body;

/** A fault of the model part's contents. */
export const fault = (code: FileErrorCode, message: string): FileError =>
  new FileError(code, message, 'Save the model again; if another program made the file, report it there.');
