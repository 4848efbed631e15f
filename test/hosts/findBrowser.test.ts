import { describe, expect, it } from 'vitest';
import { type BrowserDisk, findBrowser, hasDisplay } from '../../main/launch/findBrowser.ts';
import { browserArguments, defaultBrowserCommand } from '../../main/local/open.ts';

const diskWith = (paths: string[], links: Record<string, string> = {}): BrowserDisk => ({
  isExecutable: (path) => paths.includes(path),
  realPath: (path) => links[path] ?? path,
});
const linux = {
  platform: 'linux' as const,
  homeFolder: '/home/ada',
  env: { PATH: '/usr/local/bin:/usr/bin:.:bin' },
};

describe('finding a browser', () => {
  it('takes the one that CHROME_PATH names first', () => {
    const machine = { ...linux, env: { ...linux.env, CHROME_PATH: '/opt/own/chrome' } };
    const disk = diskWith(['/opt/own/chrome', '/usr/bin/chromium']);
    expect(findBrowser(machine, disk)?.path).toBe('/opt/own/chrome');
    expect(findBrowser(machine, diskWith(['/usr/bin/chromium']))?.path).toBe('/usr/bin/chromium');
  });

  it.each([
    ['linux', '/usr/bin/google-chrome-stable'],
    ['linux', '/usr/local/bin/chromium'],
    ['linux', '/usr/bin/chromium-browser'],
    ['linux', '/usr/bin/microsoft-edge'],
    ['linux', '/snap/bin/chromium'],
    ['darwin', '/Applications/Google Chrome.app/Contents/MacOS/Google Chrome'],
    ['darwin', '/home/ada/Applications/Chromium.app/Contents/MacOS/Chromium'],
    ['darwin', '/Applications/Microsoft Edge.app/Contents/MacOS/Microsoft Edge'],
    ['win32', 'C:\\Program Files\\Google\\Chrome\\Application\\chrome.exe'],
    ['win32', 'C:\\Program Files (x86)\\Microsoft\\Edge\\Application\\msedge.exe'],
    ['win32', 'C:\\Users\\ada\\AppData\\Local\\Chromium\\Application\\chrome.exe'],
  ] as [NodeJS.Platform, string][])('on %s finds %s', (platform, path) => {
    const env = {
      ...linux.env,
      PROGRAMFILES: 'C:\\Program Files',
      'PROGRAMFILES(X86)': 'C:\\Program Files (x86)',
      LOCALAPPDATA: 'C:\\Users\\ada\\AppData\\Local',
    };
    expect(findBrowser({ platform, env, homeFolder: '/home/ada' }, diskWith([path]))?.path).toBe(path);
  });

  it('answers none where there is none, and looks in no relative folder', () => {
    for (const platform of ['linux', 'darwin', 'win32'] as const)
      expect(findBrowser({ platform, env: {}, homeFolder: '/home/ada' }, diskWith([]))).toBeNull();
    expect(findBrowser(linux, diskWith(['./chromium', 'bin/chromium', 'chromium']))).toBeNull();
  });

  it('knows a snap, also behind a link', () => {
    expect(findBrowser(linux, diskWith(['/snap/bin/chromium']))?.isSnap).toBe(true);
    const linked = diskWith(['/usr/bin/chromium'], { '/usr/bin/chromium': '/usr/bin/snap' });
    expect(findBrowser(linux, linked)?.isSnap).toBe(true);
    expect(findBrowser(linux, diskWith(['/usr/bin/chromium']))?.isSnap).toBe(false);
  });

  it('knows whether a window can be shown', () => {
    expect(hasDisplay({ platform: 'linux', env: {} })).toBe(false);
    expect(hasDisplay({ platform: 'linux', env: { DISPLAY: ':0' } })).toBe(true);
    expect(hasDisplay({ platform: 'linux', env: { WAYLAND_DISPLAY: 'wayland-0' } })).toBe(true);
    expect(hasDisplay({ platform: 'darwin', env: {} })).toBe(true);
    expect(hasDisplay({ platform: 'win32', env: {} })).toBe(true);
  });

  it('gives up the sandbox only as root', () => {
    const asUser = browserArguments('http://127.0.0.1:1/open/x', '/own/browser-1', false);
    expect(asUser).toContain('--app=http://127.0.0.1:1/open/x');
    expect(asUser).toContain('--user-data-dir=/own/browser-1');
    expect(
      asUser.filter((argument) => /sandbox|test-type|remote-debugging|disable-web-security/.test(argument)),
    ).toEqual([]);
    expect(browserArguments('x', 'y', true)).toEqual(expect.arrayContaining(['--no-sandbox', '--test-type']));
  });

  it('hands an address to the system without a shell', () => {
    const address = 'http://127.0.0.1:1/open/x';
    expect(defaultBrowserCommand({ platform: 'linux', env: {} }, address)).toEqual({
      path: 'xdg-open',
      args: [address],
    });
    expect(defaultBrowserCommand({ platform: 'darwin', env: {} }, address)).toEqual({
      path: '/usr/bin/open',
      args: [address],
    });
    expect(defaultBrowserCommand({ platform: 'win32', env: { SYSTEMROOT: 'C:\\Windows' } }, address)).toEqual(
      {
        path: 'C:\\Windows\\System32\\rundll32.exe',
        args: ['url.dll,FileProtocolHandler', address],
      },
    );
  });
});
