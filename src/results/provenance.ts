// What a result came from: the versions and the hash of everything that decides it.
import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex, utf8ToBytes } from '@noble/hashes/utils.js';

/** Raised in its first part whenever the same inputs give other bytes. */
export const kernelVersion = '3.0';
export const toolVersion = '0.1.0';

export interface Provenance {
  readonly tool: { readonly name: 'skein'; readonly version: string; readonly kernel: string };
  /** The title of the study. */
  readonly model: string;
  readonly hash: string;
}

/** SHA-256 of the spec as it was run and of the major version of the kernel, as 64 hexadecimal digits. */
export function provenanceOf(title: string, spec: unknown): Provenance {
  const decides = JSON.stringify({ kernel: kernelVersion.split('.')[0], spec });
  return {
    tool: { name: 'skein', version: toolVersion, kernel: kernelVersion },
    model: title,
    hash: bytesToHex(sha256(utf8ToBytes(decides))),
  };
}
