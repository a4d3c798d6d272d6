import { MeshReader } from './mesh-reader.ts';
import { MILLIMETRES } from './names.ts';
import { indexIn } from './number-text.ts';
import { fault, type ModelPart, type ObjectResource, type Placement } from './resources.ts';
import { parseTransform } from './transform.ts';
import { type Attributes, scanXml, type XmlListener } from './xml-scan.ts';

/**
 * Reads a model part strictly: known unit, every reference to something defined before it, complete meshes. Elements of
 * extensions are passed over, unless the file says that it cannot be understood without them.
 * @param otherPart reads another part of the package; left out for those, which must not lead on
 * @throws FileError `syntax`, `unit`, `index`, `transform`, `unsupported`, `metadata`
 */
export function readModelPart(bytes: Uint8Array, part: string, otherPart?: OtherPart): ModelPart {
  const reader = new ModelReader(otherPart);
  scanXml(bytes, part, reader);
  return reader.model;
}

/** Another model part by its path: the production extension lets assemblies take objects from there. */
export type OtherPart = (path: string) => ModelPart;

/** Where each element of the core stands; an empty name is the root. */
const PARENT: Readonly<Record<string, string>> = {
  'core:model': '',
  'core:metadata': 'core:model',
  'core:resources': 'core:model',
  'core:build': 'core:model',
  'core:basematerials': 'core:resources',
  'core:base': 'core:basematerials',
  'core:object': 'core:resources',
  'core:mesh': 'core:object',
  'core:vertices': 'core:mesh',
  'core:vertex': 'core:vertices',
  'core:triangles': 'core:mesh',
  'core:triangle': 'core:triangles',
  'core:components': 'core:object',
  'core:component': 'core:components',
  'core:item': 'core:build',
};

/** Extensions that change nothing of the shape, or are looked at here. */
const UNDERSTOOD = ['m', 'p', 't'];
/** Groups of properties and what they count. */
const GROUPS: Readonly<Record<string, string>> = {
  'core:basematerials': 'core:base',
  'm:colorgroup': 'm:color',
  'm:texture2dgroup': 'm:tex2coord',
  'm:compositematerials': 'm:composite',
  'm:multiproperties': 'm:multi',
};

class ModelReader implements XmlListener {
  readonly model: ModelPart = { unit: '', metadata: new Map(), objects: new Map(), items: [] };
  private readonly path: string[] = [];
  /** How deep inside an element that is passed over. */
  private skipped = 0;
  private readonly properties = new Map<number, number>();
  private group = 0;
  private object: Omit<ObjectResource, 'body'> | undefined;
  /** Attributes of the object in hand: its colour where triangles have none. */
  private defaults: Attributes = new Map();
  private mesh: MeshReader | undefined;
  private components: Placement[] | undefined;
  private metadataName: string | undefined;

  constructor(private readonly otherPart: OtherPart | undefined) {}

  open(name: string, attributes: Attributes, namespaces: ReadonlyMap<string, string>): void {
    if (this.skipped > 0 || !this.known(name)) {
      this.skipped++;
      return;
    }
    this.path.push(name);
    if (name === 'core:vertex') this.mesh!.vertex(attributes);
    else if (name === 'core:triangle') this.mesh!.triangle(attributes);
    else if (name === 'core:model') this.openModel(attributes, namespaces);
    else if (name === 'core:metadata') this.openMetadata(attributes.get('name') ?? '');
    else if (name in GROUPS) this.openGroup(attributes);
    else if (name === 'core:object') this.openObject(attributes);
    else if (name === 'core:mesh' || name === 'core:components') this.openBody(name);
    else if (name === 'core:component')
      this.components!.push(this.placement(attributes, `a component of ${this.describe()}`));
    else if (name === 'core:item')
      this.model.items.push(this.placement(attributes, `build item ${this.model.items.length + 1}`));
    else if (Object.values(GROUPS).includes(name))
      this.properties.set(this.group, this.properties.get(this.group)! + 1);
  }

  close(name: string): void {
    if (this.skipped > 0) {
      this.skipped--;
      return;
    }
    this.path.pop();
    if (name === 'core:object') this.closeObject();
    if (name === 'core:metadata') this.metadataName = undefined;
  }

  text(text: string): void {
    if (this.skipped > 0) return;
    const name = this.metadataName;
    if (name !== undefined) this.model.metadata.set(name, (this.model.metadata.get(name) ?? '') + text);
    else if (text.trim() !== '')
      throw fault('syntax', `The model has text where none belongs: "${text.trim().slice(0, 40)}".`);
  }

  /** Whether to read an element; core elements must be known and in their places. */
  private known(name: string): boolean {
    const parent = this.path.at(-1) ?? '';
    if (name in PARENT && PARENT[name] === parent) return true;
    if (name === 'core:metadatagroup') return false;
    if (name.startsWith('core:') || parent === '') {
      const element = name.slice(name.lastIndexOf(':') + 1);
      throw fault(
        'syntax',
        `The element "${element}" does not belong ${parent ? `in "${parent.slice(5)}"` : 'at the top'} of a 3MF model.`,
      );
    }
    return (name in GROUPS && parent === 'core:resources') || GROUPS[parent] === name;
  }

  private openModel(attributes: Attributes, namespaces: ReadonlyMap<string, string>): void {
    const unit = attributes.get('unit') ?? 'millimeter'; // the specification's default
    if (!Object.hasOwn(MILLIMETRES, unit)) {
      const known = Object.keys(MILLIMETRES).join(', ');
      throw fault('unit', `The model's unit "${unit}" is none of ${known}. Its size would be a guess.`);
    }
    this.model.unit = unit;
    for (const prefix of (attributes.get('requiredextensions') ?? '').split(/\s+/).filter(Boolean)) {
      const extension = namespaces.get(prefix);
      if (!extension) throw fault('syntax', `The model requires an extension "${prefix}" that it does not declare.`);
      if (!UNDERSTOOD.includes(extension))
        throw fault(
          'unsupported',
          `The model cannot be understood without the extension ${extension}, which is not read here.`,
        );
    }
  }

  private openMetadata(name: string): void {
    if (this.model.metadata.has(name)) throw fault('metadata', `The metadata "${name}" stands twice.`);
    this.model.metadata.set(name, '');
    this.metadataName = name;
  }

  private openGroup(attributes: Attributes): void {
    this.group = this.newId(attributes, 'property group');
    this.properties.set(this.group, 0);
  }

  private openObject(attributes: Attributes): void {
    const id = this.newId(attributes, 'object');
    const [name, partNumber, type] = [
      attributes.get('name') ?? '',
      attributes.get('partnumber') ?? '',
      attributes.get('type') ?? 'model',
    ];
    this.object = { id, name, partNumber, type };
    this.mesh = this.components = undefined;
    this.defaults = attributes;
  }

  private openBody(name: string): void {
    if (this.mesh || this.components) throw fault('syntax', `${this.describe()} holds more than one mesh or assembly.`);
    if (name === 'core:mesh') this.mesh = new MeshReader(this.describe(), this.properties);
    else this.components = [];
  }

  private closeObject(): void {
    const [object, what] = [this.object!, this.describe()];
    if ((this.mesh === undefined) === (this.components === undefined))
      throw fault('syntax', `${what} must hold either a mesh or components.`);
    if (this.components?.length === 0) throw fault('empty', `${what} is an assembly of nothing.`);
    const body = this.mesh ? this.mesh.finish(this.defaults) : this.components!;
    this.model.objects.set(object.id, { ...object, body });
    this.object = undefined;
  }

  private newId(attributes: Attributes, kind: string): number {
    const id = indexIn(attributes.get('id'));
    if (!(id > 0))
      throw fault('index', `An ${kind} has the id "${attributes.get('id') ?? ''}"; ids are whole numbers from 1 on.`);
    if (this.properties.has(id) || this.model.objects.has(id)) throw fault('index', `The id ${id} is given twice.`);
    return id;
  }

  private placement(attributes: Attributes, where: string): Placement {
    const object = this.objectsAt(attributes.get('p:path'), where).get(indexIn(attributes.get('objectid')));
    if (object) return { object, transform: parseTransform(attributes.get('transform'), where) };
    throw fault(
      'index',
      `${where} names object "${attributes.get('objectid') ?? ''}", which is not defined before it.`,
    );
  }

  private objectsAt(path: string | undefined, where: string): ReadonlyMap<number, ObjectResource> {
    if (path === undefined) return this.model.objects;
    if (!this.otherPart)
      throw fault(
        'unsupported',
        `${where} leads from one part of the package on to another, which 3MF does not allow.`,
      );
    const { objects, unit } = this.otherPart(path);
    if (unit === this.model.unit) return objects;
    throw fault('unit', `${where} takes an object in the unit ${unit} into a model in the unit ${this.model.unit}.`);
  }

  private describe(): string {
    const { id, name } = this.object!;
    return name ? `object ${id} "${name}"` : `object ${id}`;
  }
}
