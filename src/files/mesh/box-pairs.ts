/** Boxes a leaf of the tree holds at most. */
const LEAF = 4;

/**
 * Calls `visit(i, j)`, i before j in the tree's order, for each pair of boxes that overlap or touch; stops when it
 * returns false. Goes through a balanced tree of boxes, halved at the median along the longest side, in an order that
 * depends on the boxes only. About n log n steps when few boxes overlap.
 * @param boxes six numbers a box: least x, y, z, greatest x, y, z.
 */
export function visitOverlaps(boxes: Float64Array, visit: (i: number, j: number) => boolean): void {
  const tree = growTree(boxes);
  if (tree.starts.length === 0) return;
  const open = [0, 0];
  while (open.length > 0) {
    const b = open.pop()!;
    const a = open.pop()!;
    if (a !== b && !overlap(tree.bounds, a, tree.bounds, b)) continue;
    const [left, right] = [tree.children[a]!, tree.children[b]!];
    if (left === 0 && right === 0) {
      if (!visitLeaves(boxes, tree, a, b, visit)) return;
    } else if (a === b) open.push(left + 1, left + 1, left, left + 1, left, left);
    else if (right === 0 || (left !== 0 && size(tree, a) >= size(tree, b))) open.push(left + 1, b, left, b);
    else open.push(a, right + 1, a, right);
  }
}

interface Tree {
  /** The boxes' numbers; each node holds a run of them. */
  readonly order: Uint32Array;
  readonly starts: number[];
  readonly ends: number[];
  /** The number of the first of a node's two children, which follow each other; 0 for a leaf. */
  readonly children: number[];
  readonly bounds: number[];
}

const size = (tree: Tree, node: number): number => tree.ends[node]! - tree.starts[node]!;

function visitLeaves(boxes: Float64Array, tree: Tree, a: number, b: number, visit: (i: number, j: number) => boolean) {
  for (let m = tree.starts[a]!; m < tree.ends[a]!; m++) {
    const i = tree.order[m]!;
    for (let n = a === b ? m + 1 : tree.starts[b]!; n < tree.ends[b]!; n++) {
      const j = tree.order[n]!;
      if (overlap(boxes, i, boxes, j) && !visit(i, j)) return false;
    }
  }
  return true;
}

function overlap(boxes: ArrayLike<number>, i: number, others: ArrayLike<number>, j: number): boolean {
  const m = 6 * i;
  const n = 6 * j;
  return (
    boxes[m]! <= others[n + 3]! &&
    boxes[m + 3]! >= others[n]! &&
    boxes[m + 1]! <= others[n + 4]! &&
    boxes[m + 4]! >= others[n + 1]! &&
    boxes[m + 2]! <= others[n + 5]! &&
    boxes[m + 5]! >= others[n + 2]!
  );
}

function growTree(boxes: Float64Array): Tree {
  const count = boxes.length / 6;
  const order = Uint32Array.from({ length: count }, (_, i) => i);
  const tree: Tree = { order, starts: [], ends: [], children: [], bounds: [] };
  const addNode = (start: number, end: number): void => {
    tree.starts.push(start);
    tree.ends.push(end);
    tree.children.push(0);
    tree.bounds.push(...boundsOf(boxes, order, start, end));
  };
  if (count > 0) addNode(0, count);
  for (let node = 0; node < tree.starts.length; node++) {
    const [start, end] = [tree.starts[node]!, tree.ends[node]!];
    if (end - start <= LEAF) continue;
    const middle = (start + end) >>> 1;
    const keys = centres(boxes, order, start, end, longestSide(tree.bounds, node));
    selectMedian(keys, order.subarray(start, end), middle - start);
    tree.children[node] = tree.starts.length;
    addNode(start, middle);
    addNode(middle, end);
  }
  return tree;
}

function boundsOf(boxes: Float64Array, order: Uint32Array, start: number, end: number): number[] {
  const bounds = [Infinity, Infinity, Infinity, -Infinity, -Infinity, -Infinity];
  for (let m = start; m < end; m++) {
    const from = 6 * order[m]!;
    for (let axis = 0; axis < 3; axis++) {
      if (boxes[from + axis]! < bounds[axis]!) bounds[axis] = boxes[from + axis]!;
      if (boxes[from + axis + 3]! > bounds[axis + 3]!) bounds[axis + 3] = boxes[from + axis + 3]!;
    }
  }
  return bounds;
}

function longestSide(bounds: readonly number[], node: number): number {
  const side = (axis: number): number => bounds[6 * node + axis + 3]! - bounds[6 * node + axis]!;
  if (side(0) >= side(1) && side(0) >= side(2)) return 0;
  return side(1) >= side(2) ? 1 : 2;
}

/** Twice the middle of each box along an axis, in the order of the run. */
function centres(boxes: Float64Array, order: Uint32Array, start: number, end: number, axis: number): Float64Array {
  const keys = new Float64Array(end - start);
  for (let m = start; m < end; m++) keys[m - start] = boxes[6 * order[m]! + axis]! + boxes[6 * order[m]! + axis + 3]!;
  return keys;
}

/** Hoare's selection: afterwards no key before `middle` exceeds one after it. Moves keys and items together. */
function selectMedian(keys: Float64Array, items: Uint32Array, middle: number): void {
  let low = 0;
  let high = keys.length - 1;
  while (low < high) {
    const pivot = keys[(low + high) >>> 1]!;
    let i = low;
    let j = high;
    while (i <= j) {
      while (keys[i]! < pivot) i++;
      while (keys[j]! > pivot) j--;
      if (i > j) break;
      [keys[i], keys[j]] = [keys[j]!, keys[i]!];
      [items[i], items[j]] = [items[j]!, items[i]!];
      i++;
      j--;
    }
    if (middle <= j) high = j;
    else if (middle >= i) low = i;
    else return;
  }
}
