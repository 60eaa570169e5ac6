// GeoJSON is in degrees on WGS84 by its standard; older files may say otherwise, and then the spec must agree.
import { put, type Report } from '../shape/report.ts';
import type { SourceMap, SourceNode } from '../text/source.ts';

const degrees = /(?:CRS:?84|EPSG:+4326)$/iu;

export function checkCrs(root: SourceMap, position: string | undefined, report: Report): void {
  const crs = root.entries.find((entry) => entry.key === 'crs');
  const name = crs === undefined ? undefined : nameOf(crs.value);
  if (crs === undefined || name === undefined) return;
  const inDegrees = degrees.test(name);
  if (inDegrees && position === 'plane') {
    put(
      report,
      {
        code: 'geojson-crs',
        message: 'The file says that its places are degrees, and the spec says that they lie on a plane',
        span: crs.keySpan,
      },
      { found: name, fix: 'Write `position: longitude-latitude` in the spec, without `unit`.' },
    );
  } else if (!inDegrees && position === 'longitude-latitude') {
    put(
      report,
      {
        code: 'geojson-crs',
        message: 'The file names a system of places that is not degrees on WGS84',
        span: crs.keySpan,
      },
      {
        found: name,
        expected: 'longitude and latitude on WGS84, as GeoJSON is by its standard (RFC 7946)',
        fix: 'Export the file in WGS84 (EPSG:4326), or write `position: plane` with the `unit` of the system.',
      },
    );
  }
}

function nameOf(crs: SourceNode): string | undefined {
  const step = (node: SourceNode | undefined, key: string): SourceNode | undefined =>
    node?.kind === 'map' ? node.entries.find((entry) => entry.key === key)?.value : undefined;
  const name = step(step(crs, 'properties'), 'name');
  return name?.kind === 'scalar' ? name.source : undefined;
}
