/** A mineral's name and the remark in round brackets after it: "Urea", "laboratory crystal". */
export function splitRemark(name: string): { readonly name: string; readonly remark: string | null } {
  const [, before, remark] = /^(.*\S)\s+\(([^()]+)\)$/.exec(name) ?? [];
  return before === undefined || remark === undefined ? { name, remark: null } : { name: before, remark };
}
