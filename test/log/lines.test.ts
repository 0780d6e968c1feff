import {describe, expect, test} from 'vitest';
import {
  accountOf,
  bytesOf,
  findingOf,
  gga,
  lines,
  readBytes,
  readText,
  sentence,
} from './nmea-text.ts';

const GGA = gga('120000.00');

function adds(text: string, options = {}) {
  const account = accountOf(readText(text, options));
  expect(account.used + account.ignored + account.rejected).toBe(account.total);
  return account;
}

describe('what is a line', () => {
  test.each([
    ['\r\n', 'CRLF'],
    ['\n', 'LF'],
    ['\r\r\n', 'CR CR LF'],
    ['\r\r\r\n', 'CR CR LF'],
    ['', 'none'],
  ] as const)('a sentence ends with %j', (end, name) => {
    const account = adds(`${sentence(GGA)}${end}`);
    expect(account.lineEnds[name]).toBe(1);
    expect(account.used).toBe(1);
  });

  test('blank lines, comments and other text are ignored by name', () => {
    const account = adds(`\r\n\n# by hand\r\nsome words\n${sentence(GGA)}\r\n`);
    expect(account.lines.ignored).toEqual({blank: 2, comment: 1, text: 1});
    expect(account.total).toBe(5);
  });

  test.each([
    ['a byte order mark', `\u00ef\u00bb\u00bf${sentence(GGA)}\r\n`],
    ['a time stamp before it', `2026-08-05T12:00:00.123Z ${sentence(GGA)}\r\n`],
    ['a word before it', `NMEA,${sentence(GGA)}\r\n`],
    ['milliseconds behind it', `${sentence(GGA)},1785931200123\r\n`],
    ['a TAG block', `\\s:station1,c:1785931200*0F\\${sentence(GGA)}\r\n`],
    ['a lower-case checksum', `${sentence(GGA).replace(/..$/, (hex) => hex.toLowerCase())}\r\n`],
  ])('a sentence is read with %s', (_, text) => {
    const account = adds(text);
    expect(account.total).toBe(1);
    expect(account.used).toBe(1);
    expect(account.betweenBytes).toBe(0);
  });

  test('sentences glued together count one line each', () => {
    const account = adds(`${sentence(GGA)}${sentence(gga('120001.00'))}\r\n`);
    expect(account.used).toBe(2);
    expect(account.lineEnds).toEqual({CRLF: 1, LF: 0, 'CR CR LF': 0, none: 1});
  });

  test('glued sentences are told apart even where their common checksum would hold', () => {
    // The XOR over both sentences equals the second checksum when the first one is 7B.
    const first = [...Array(256).keys()]
      .map((k) => sentence(`GNGLL,${k},N`))
      .find((one) => one.endsWith('*7B'))!;
    expect(adds(`${first}${sentence(GGA)}\r\n`).used).toBe(1);
  });

  test('a sentence broken off by the next one is cut short', () => {
    const account = adds(`$GNGGA,1200${sentence(GGA)}\r\n`);
    expect(account.lines.rejected).toEqual({'cut short': 1});
    expect(account.used).toBe(1);
    expect(account.checksums).toEqual({good: 1, bad: 0, absent: 1});
  });

  test('the sentence in which a log ends is cut short, and the user is told', () => {
    const contents = readText(`${sentence(GGA)}\r\n${sentence(gga('120001.00')).slice(0, 30)}`);
    expect(accountOf(contents).lines.rejected).toEqual({'cut short': 1});
    expect(findingOf(contents, 'last-line-cut')).toBeDefined();
    expect(accountOf(readText(`${sentence(GGA)}\r\n$GN`)).lines.rejected).toEqual({'cut short': 1});
    expect(findingOf(readText(sentence(GGA)), 'last-line-cut')).toBeUndefined();
  });

  test('the end of a sentence at the start of a log has no start', () => {
    expect(adds(`5,M,46.9,M,,*47\r\n${sentence(GGA)}\r\n`).lines.rejected).toEqual({'no start': 1});
  });

  test('a dollar without an address is no sentence', () => {
    const account = adds('$gngga,lower\r\n$\r\n!a,b\r\n$AVERYLONGADDRESS1,1\r\n');
    expect(account.lines.rejected).toEqual({'no address': 4});
  });

  test('a sentence beyond any reason is too long', () => {
    const account = adds(`${sentence(`GNTXT,${'x'.repeat(2000)}`)}\r\n`);
    expect(account.lines.rejected).toEqual({'too long': 1});
  });

  test('line numbers are those of an editor', () => {
    const {epochs} = readText(`# one\r\n\r\n${sentence(GGA)}${sentence(gga('120001.00'))}\r\n`);
    expect([...epochs.lineNumber]).toEqual([3, 3]);
  });
});

describe('bytes between lines', () => {
  test('binary data before, between and behind sentences is counted', () => {
    const binary = '\u00d3\u0000\u0013\u0001';
    const text = `${binary}${sentence(GGA)}\r\n${binary}\n${sentence(gga('120001.00'))}${binary}\r\n`;
    const account = adds(text);
    // The piece between two line feeds that is no line counts with its line feed.
    expect(account.betweenBytes).toBe(4 + 5 + 4);
    expect(account.used).toBe(2);
    expect(account.total).toBe(2);
  });

  test('a sentence broken off by binary data is cut short there', () => {
    const account = adds('$GNGGA,1200\u0001\u0002\u0003\r\n');
    expect(account.lines.rejected).toEqual({'cut short': 1});
    expect(account.betweenBytes).toBe(3);
  });

  test('text in UTF-8 is text', () => {
    const bytes = new Uint8Array(Buffer.from(`# Höhe über Grund €\n${sentence(GGA)}\n`, 'utf8'));
    const account = accountOf(readBytes(bytes));
    expect(account.lines.ignored).toEqual({comment: 1});
    expect(account.betweenBytes).toBe(0);
  });

  test('an address that binary data imitates needs its comma', () => {
    expect(adds('\u0001$AB\u0002$ABC\u0003\n').betweenBytes).toBe(11);
  });
});

describe('checksums', () => {
  test('a sentence without one is rejected unless such sentences are trusted', () => {
    const bare = `$${GGA}\r\n`;
    expect(adds(bare).lines.rejected).toEqual({'no checksum': 1});
    const trusting = readText(bare, {trustAbsentChecksum: true});
    expect(accountOf(trusting).used).toBe(1);
    expect(trusting.epochs.count).toBe(1);
    expect(findingOf(trusting, 'checksum-absent')?.values).toEqual({lines: 1, trusted: true});
  });

  test('a cut sentence is not trusted', () => {
    const cut = `$GNGGA,120000.00,4807.0380000,N,011${sentence(GGA)}\r\n`;
    expect(accountOf(readText(cut, {trustAbsentChecksum: true})).rejected).toBe(1);
    expect(accountOf(readText(`$${GGA}`, {trustAbsentChecksum: true})).rejected).toBe(1);
  });

  test('a wrong one is rejected, trusted or not', () => {
    const wrong = `$${GGA}*00\r\n`;
    for (const trustAbsentChecksum of [false, true]) {
      expect(adds(wrong, {trustAbsentChecksum}).lines.rejected).toEqual({'bad checksum': 1});
    }
  });

  test('examples of rejected lines say where and what', () => {
    const account = adds(`${sentence(GGA)}\r\n${`$${GGA}*00\r\n`.repeat(9)}`);
    expect(account.rejectedLines).toHaveLength(5);
    expect(account.rejectedLines[0]).toEqual({
      lineNumber: 2,
      reason: 'bad checksum',
      excerpt: `$${GGA}*00`.slice(0, 80),
    });
    const [control] = accountOf(readText('$GNGGA,12\t00*00\r\n')).rejectedLines;
    expect(control?.excerpt).toBe('$GNGGA,12·00*00');
  });
});

describe('what becomes of a sentence', () => {
  test('types that are not needed are ignored by name', () => {
    const account = adds(
      lines('GNVTG,,T,,M,0.0,N,0.0,K,A', 'PXYZ,1', 'PXYZ123,2', 'GNGLL,,,,,,V') +
        `${sentence('AIVDM,1,1,,A,13aGa?P00PHfERNFruh0?vN289E,0', '!')}\r\n`,
    );
    expect(account.lines.ignored).toEqual({VTG: 1, proprietary: 2, GLL: 1, '!AIVDM': 1});
    expect(account.sentences).toEqual({GNVTG: 1, PXYZ: 1, PXYZ123: 1, GNGLL: 1, '!AIVDM': 1});
  });

  test.each([
    ['unreadable number', 'GNGGA,120000.00,4807.0,N,01131.0,E,4,1x,0.8,545.4,M,46.9,M,,'],
    ['unreadable number', 'GNGGA,120000.00,4807.0,N,01131.0,E,4,10,0.8,5-45.4,M,46.9,M,,'],
    ['unreadable time', 'GNGGA,240000.00,4807.0,N,01131.0,E,4,10,0.8,545.4,M,46.9,M,,'],
    ['unreadable time', 'GNGGA,1200,4807.0,N,01131.0,E,4,10,0.8,545.4,M,46.9,M,,'],
    ['unreadable time', 'GNGGA,120060.00,4807.0,N,01131.0,E,4,10,0.8,545.4,M,46.9,M,,'],
    ['unreadable position', 'GNGGA,120000.00,9107.0,N,01131.0,E,4,10,0.8,545.4,M,46.9,M,,'],
    ['unreadable position', 'GNGGA,120000.00,4861.0,N,01131.0,E,4,10,0.8,545.4,M,46.9,M,,'],
    ['unreadable position', 'GNGGA,120000.00,4807.0,X,01131.0,E,4,10,0.8,545.4,M,46.9,M,,'],
    ['unreadable position', 'GNGGA,120000.00,4807.0,,01131.0,E,4,10,0.8,545.4,M,46.9,M,,'],
    ['unreadable position', 'GNGGA,120000.00,4807.0,N,18131.0,E,4,10,0.8,545.4,M,46.9,M,,'],
    ['unreadable position', 'GNGGA,120000.00,4807.0,N,,,4,10,0.8,545.4,M,46.9,M,,'],
    ['unreadable position', 'GNGGA,120000.00,-4807.0,N,01131.0,E,4,10,0.8,545.4,M,46.9,M,,'],
    ['height not in metres', 'GNGGA,120000.00,4807.0,N,01131.0,E,4,10,0.8,545.4,F,46.9,M,,'],
    ['position without time', 'GNGGA,,4807.0,N,01131.0,E,4,10,0.8,545.4,M,46.9,M,,'],
    ['unreadable date', 'GNRMC,120000.00,A,4807.0,N,01131.0,E,0.0,,310226,,,A'],
    ['unreadable date', 'GNZDA,120000.00,31,02,2026,00,00'],
    ['unreadable number', 'GNGST,120000.00,,,,,a,b,c'],
    ['unreadable number', 'GNGSA,A,3,1.5,,,,,,,,,,,,1.0,0.6,0.8,1'],
    ['unreadable number', 'GNGNS,120000.00,4807.0,N,01131.0,E,RR,10,zero,545.4,46.9,,,V'],
  ])('%s: %s', (reason, body) => {
    expect(adds(lines(body)).lines.rejected).toEqual({[reason]: 1});
  });

  test('an empty sentence of a decoded type is used, and yields nothing', () => {
    const account = adds(
      lines('GNGGA', 'GNGGA,,,,,,0,,,,,,,,', 'GNRMC,,V,,,,,,,,,,N', 'GNGST,,,,,,,,'),
    );
    expect(account.used).toBe(4);
  });

  test('a number may have more decimals than count', () => {
    const body = 'GNGGA,120000.00,4807.03800000000001,N,01131.0,E,4,10,0.8,545.4,M,46.9,M,,';
    const {epochs, resolution} = readText(lines(body));
    expect(epochs.latitudeDeg[0]).toBe(48 + 7.038 / 60);
    expect(resolution.latitudeDeg).toBeCloseTo(1e-9 / 60, 20);
  });

  test('a sentence may have more fields than are looked at', () => {
    expect(adds(lines(`${GGA}${',1'.repeat(100)}`)).used).toBe(1);
  });

  test('many different addresses are told apart', () => {
    const bodies = [...Array(600).keys()].map((k) => `A${String(k).padStart(4, '0')},1`);
    const account = adds(bytesText(lines(...bodies, ...bodies)));
    expect(Object.keys(account.sentences)).toHaveLength(600);
    expect(Object.values(account.sentences).every((count) => count === 2)).toBe(true);
  });
});

function bytesText(text: string): string {
  return Buffer.from(bytesOf(text)).toString('latin1');
}
