/** The manifest against its schemas and against the host's rules that no schema holds. */
import { execFileSync } from 'node:child_process';
import fs from 'node:fs';
import path from 'node:path';
import { JSDOM } from 'jsdom';
import { validateXML } from 'xmllint-wasm';
import { ICON_SIZES, renderIcon } from '../../scripts/icons.cjs';
import packageFile from '../../package.json';

const root = path.resolve(__dirname, '../..');
const text = fs.readFileSync(path.join(root, 'manifest.xml'), 'utf8');
const xml = new JSDOM(text, { contentType: 'text/xml' }).window.document;
const all = (name: string): Element[] => [...xml.getElementsByTagName(name)];
const the = (name: string): Element => {
  const found = all(name);
  if (found.length !== 1) throw new Error(`${found.length} elements ${name}`);
  return found[0]!;
};
const value = (element: Element): string => element.getAttribute('DefaultValue') ?? '';
const resources = [...the('Resources').querySelectorAll('[id]')];
const resource = (id: string): string => value(resources.find((one) => one.id === id)!);
const children = (element: Element): string[] => [...element.children].map((child) => child.nodeName);

const schemas = process.env.MANIFEST_XSD_DIR ?? path.join(root, '../shared/manifest-xsd');
const withSchemas = fs.existsSync(schemas) ? it : it.skip;

withSchemas('is valid against the published schemas (skipped without MANIFEST_XSD_DIR)', async () => {
  const read = (fileName: string) => ({
    fileName,
    contents: fs.readFileSync(path.join(schemas, fileName), 'utf8'),
  });
  const [main, overrides] = ['OfficeAppManifestV1_1.xsd', 'TaskPaneAppVersionOverridesV1_0.xsd'];
  const others = fs.readdirSync(schemas).filter((file) => file.endsWith('.xsd') && file !== main);
  expect(others).toContain(overrides);
  const preload = others.map(read);
  const check = (contents: string) =>
    validateXML({ xml: [{ fileName: 'manifest.xml', contents }], schema: [read(main)], preload });
  expect(await check(text)).toMatchObject({ valid: true, errors: [] });
  // the check can fail: an element in the wrong place is found
  const wrong = text.replace(
    '<Permissions>ReadWriteDocument</Permissions>',
    '<Permissions>Everything</Permissions>',
  );
  expect((await check(wrong)).valid).toBe(false);
});

it('is read by the platform’s own tool', () => {
  const tool = path.join(root, 'node_modules/office-addin-manifest/cli.js');
  const words = execFileSync(process.execPath, [tool, 'info', path.join(root, 'manifest.xml')], {
    encoding: 'utf8',
  });
  expect(words).toContain('Spanrow');
  expect(words).toContain(the('Id').textContent);
});

describe('resources', () => {
  it('every resid names one resource of at most 32 characters, and every resource is named', () => {
    const named = [...xml.querySelectorAll('[resid]')].map((element) => element.getAttribute('resid')!);
    const ids = resources.map((one) => one.id);
    expect(new Set(ids).size).toBe(ids.length);
    expect([...new Set(named)].sort()).toEqual([...ids].sort());
    for (const id of ids) expect(id.length).toBeLessThanOrEqual(32);
  });

  it('short strings stay within 125 characters, long ones within 250', () => {
    for (const one of the('bt:ShortStrings').children) expect(value(one).length).toBeLessThanOrEqual(125);
    for (const one of the('bt:LongStrings').children) expect(value(one).length).toBeLessThanOrEqual(250);
    expect(value(xml.querySelector('OfficeApp > Description')!).length).toBeLessThanOrEqual(250);
  });

  it('every address is https and of one origin', () => {
    const addresses = text
      .match(/https?:\/\/[^"<\s]+/g)!
      .filter(
        (address) => !address.startsWith('http://schemas.') && !address.startsWith('http://www.w3.org'),
      );
    expect(addresses.length).toBeGreaterThan(8);
    for (const address of addresses) expect(new URL(address).origin).toBe('https://localhost:3000');
  });
});

describe('shared runtime', () => {
  it('runtime, functions page, function file and button are one page', () => {
    const runtime = the('Runtime');
    expect(runtime.getAttribute('lifetime')).toBe('long');
    const page = runtime.getAttribute('resid');
    expect(the('Page').firstElementChild!.getAttribute('resid')).toBe(page);
    expect(the('FunctionFile').getAttribute('resid')).toBe(page);
    expect(the('Action').querySelector('SourceLocation')!.getAttribute('resid')).toBe(page);
    expect(resource(page!)).toBe(value(the('DefaultSettings').firstElementChild!));
  });

  it('stands in the order the host reads', () => {
    const host = the('VersionOverrides').querySelector('Host')!;
    expect(children(host)).toEqual(['Runtimes', 'AllFormFactors', 'DesktopFormFactor']);
    expect(children(host.querySelector('AllFormFactors')!.firstElementChild!)).toEqual([
      'Script',
      'Page',
      'Metadata',
      'Namespace',
    ]);
    expect(children(the('DesktopFormFactor'))).toEqual(['GetStarted', 'FunctionFile', 'ExtensionPoint']);
  });

  it('asks for nothing but the shared runtime', () => {
    expect(all('Set').map((set) => [set.getAttribute('Name'), set.getAttribute('MinVersion')])).toEqual([
      ['SharedRuntime', '1.1'],
    ]);
  });

  it('names files that the build writes', () => {
    expect(resource('Functions.Script.Url')).toMatch(/\/functions\.js$/);
    expect(resource('Functions.Metadata.Url')).toMatch(/\/functions\.json$/);
    expect(resource('Functions.Namespace')).toBe('SPANROW');
  });
});

it('names no domain of its own: the add-in’s own is allowed anyway', () => {
  expect(all('AppDomain')).toEqual([]);
});

it('has the version of the package', () => {
  expect(the('Version').textContent).toBe(`${packageFile.version}.0`);
});

it('keeps its id: workbooks hold it', () => {
  expect(the('Id').textContent).toBe('77813a85-b2a6-4e56-96bf-0709be1ed51f');
});

describe('icons', () => {
  const svg = fs.readFileSync(path.join(root, 'assets/icon.svg'), 'utf8');

  it('has 16, 32 and 80 in the ribbon and 64 and 128 for the add-in', () => {
    const ribbon = [
      ...new Set(
        all('bt:Image')
          .filter((one) => one.hasAttribute('size'))
          .map((one) => one.getAttribute('size')),
      ),
    ];
    expect(ribbon).toEqual(['16', '32', '80']);
    for (const size of ribbon)
      expect(resource(`Icon.${size}`)).toMatch(new RegExp(`/assets/icon-${size}\\.png$`));
    expect(value(the('IconUrl'))).toMatch(/icon-64\.png$/);
    expect(value(the('HighResolutionIconUrl'))).toMatch(/icon-128\.png$/);
  });

  it.each(ICON_SIZES)('is drawn at %i px, square, not empty', (size) => {
    const png = renderIcon(svg, size);
    expect(png.subarray(1, 4).toString()).toBe('PNG');
    // PNG, section 11.2.2 (IHDR): width and height are the first two big-endian words of the first chunk
    expect([png.readUInt32BE(16), png.readUInt32BE(20)]).toEqual([size, size]);
    expect(png.length).toBeGreaterThan(200);
  });
});
