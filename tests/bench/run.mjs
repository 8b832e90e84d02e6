// Runs the benchmarks over the compiled program: npm run bench [NAME ...]. Each file NAME.bench.mjs exports `title` and
// `run(print)`. Figures are of this machine at this moment: compare ratios within one run.
import { readdirSync } from 'node:fs';
import { availableParallelism } from 'node:os';

const wanted = process.argv.slice(2);
const files = readdirSync(new URL('.', import.meta.url))
  .filter((f) => f.endsWith('.bench.mjs'))
  .filter((f) => wanted.length === 0 || wanted.some((w) => f.startsWith(w)))
  .sort();
console.log(`Node ${process.version}, ${availableParallelism()} processors`);
for (const file of files) {
  const bench = await import(new URL(file, import.meta.url).href);
  console.log(`\n${bench.title}`);
  await bench.run((line) => console.log(`  ${line}`));
}
