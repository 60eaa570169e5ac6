// One uniform number a lane for what concerns the landscape or a patch as a whole, from the block at hand.
import { words } from '../batch';
import { finalise, firstWord, streamOf, unit } from '../draws/stream';

export function uniform(lane: i32, use: i32): f64 {
  const stream = streamOf(0, use);
  const at = words + ((<usize>lane) << 3);
  return unit(firstWord(finalise(load<u64>(at) + stream), finalise(load<u64>(at, 128) + stream)));
}
