import { readFile } from 'node:fs/promises';
import { createRequire } from 'node:module';

const find = createRequire(import.meta.url).resolve;

/** Reads the faces that papers embed from their npm packages (both under free licences). */
export async function loadFonts(): Promise<{
  readonly regular: Uint8Array;
  readonly bold: Uint8Array;
  readonly fallback: Uint8Array;
  readonly fallbackBold: Uint8Array;
}> {
  const [regular, bold, fallback, fallbackBold] = await Promise.all(
    [
      '@expo-google-fonts/atkinson-hyperlegible-next/400Regular/AtkinsonHyperlegibleNext_400Regular.ttf',
      '@expo-google-fonts/atkinson-hyperlegible-next/700Bold/AtkinsonHyperlegibleNext_700Bold.ttf',
      'dejavu-fonts-ttf/ttf/DejaVuSans.ttf',
      'dejavu-fonts-ttf/ttf/DejaVuSans-Bold.ttf',
    ].map((path) => readFile(find(path))),
  );
  return { regular: regular!, bold: bold!, fallback: fallback!, fallbackBold: fallbackBold! };
}
