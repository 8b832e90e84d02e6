export { basename, dirname, isAbsolute, join, relative, resolve } from 'node:path';
