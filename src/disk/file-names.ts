import { DiskError } from './disk-error.ts';

/**
 * Names and characters that no file may have on Windows, with or without an extension. Source: Microsoft, Naming Files,
 * Paths, and Namespaces. They are refused everywhere, so that a folder of models can be moved to any machine.
 */
const RESERVED = /^(con|prn|aux|nul|conin\$|conout\$|com[0-9\u00b9\u00b2\u00b3]|lpt[0-9\u00b9\u00b2\u00b3])( *\..*)?$/i;
const FORBIDDEN = /[<>:"|?*]/u;
/** Control characters, broken surrogates and line separators. */
const INVISIBLE = /[\p{Cc}\p{Cs}\p{Zl}\p{Zp}]/u;
/** The limit of the usual file systems, in bytes of UTF-8. */
const LONGEST = 255;

/**
 * Refuses names that would leave the folder, that some system cannot have, or that two files share. Names that differ
 * in case only, or in how accents are composed, are one name on many systems.
 * @throws DiskError `badName`
 */
export function assertFileNames(names: readonly string[]): void {
  const taken = new Map<string, string>();
  for (const name of names) {
    const fault = faultOf(name);
    if (fault !== undefined) throw new DiskError('badName', `The file name ${JSON.stringify(name)} ${fault}`);
    const key = name.normalize('NFC').toLowerCase();
    const other = taken.get(key);
    if (other !== undefined)
      throw new DiskError('badName', `Two files would be called ${JSON.stringify(name)}. Give them different names.`);
    taken.set(key, name);
  }
}

/** What is wrong with the name, and what mends it; nothing for a good name. */
function faultOf(name: string): string | undefined {
  if (name === '') return 'is empty. Give the file a name.';
  if (INVISIBLE.test(name)) return 'contains a control character. Leave it out.';
  if (/[/\\]/.test(name) || name === '.' || name === '..')
    return 'leads out of its folder. Give a name without / and \\, and choose the folder separately.';
  if (FORBIDDEN.test(name)) return 'contains one of < > : " | ? *, which Windows does not allow. Leave it out.';
  if (/^ |[ .]$/.test(name)) return 'begins with a space or ends with a space or a dot. Leave it out.';
  if (RESERVED.test(name)) return 'is the name of a device on Windows. Choose another one.';
  if (new TextEncoder().encode(name).length > LONGEST) return `is longer than ${LONGEST} bytes. Choose a shorter one.`;
  return undefined;
}
