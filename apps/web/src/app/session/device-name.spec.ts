import { deviceName } from './device-name';

const APPLE = 'AppleWebKit/537.36 (KHTML, like Gecko)';

describe('deviceName', () => {
  it.each([
    [`Mozilla/5.0 (X11; Linux x86_64) ${APPLE} Chrome/140.0.0.0 Safari/537.36`, 'Chrome on Linux'],
    [
      `Mozilla/5.0 (Windows NT 10.0; Win64; x64) ${APPLE} Chrome/140.0 Safari/537.36 Edg/140.0`,
      'Edge on Windows',
    ],
    ['Mozilla/5.0 (X11; Linux x86_64; rv:140.0) Gecko/20100101 Firefox/140.0', 'Firefox on Linux'],
    [
      `Mozilla/5.0 (Linux; Android 14; Tablet) ${APPLE} Chrome/140.0.0.0 Safari/537.36`,
      'Chrome on Android',
    ],
    [
      'Mozilla/5.0 (iPad; CPU OS 18_0 like Mac OS X) AppleWebKit/605.1.15 Version/18.0 Mobile/15E148 Safari/604.1',
      'Safari on an iPad',
    ],
    ['curl/8.0', 'curl/8.0'],
    ['', 'an unnamed browser'],
  ])('calls %s %s', (said, name) => {
    expect(deviceName(said)).toBe(name);
  });
});
