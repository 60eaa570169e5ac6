// npm run demo: from a bare clone to the report of the flagship model.
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { build, installPackages, root, run } from './setup.mjs';

const model = 'models/reed-hare.yaml';
const page = join('build', 'reed-hare.html');

installPackages();
build();
const skein = (...words) => run(process.execPath, ['bin/skein.cjs', ...words]);
console.log(`\n$ skein check ${model}\n`);
skein('check', model);
console.log(`\n$ skein run ${model}\n`);
skein('run', model);
console.log(`\n$ skein report ${model} -o ${page}\n`);
skein('report', model, '-o', page, '--quiet');
console.log(`The report is at ${join(root, page)}\nOpen it in a browser: ${pathToFileURL(join(root, page)).href}`);
