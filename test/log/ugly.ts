import {gga, rmc, sentence} from './nmea-text.ts';

/** Every way in which real loggers bend the standard, in one log of more than 5 kB. */
export function uglyLog(): Uint8Array {
  const parts: string[] = ['\u00ef\u00bb\u00bf'];
  for (let second = 0; second < 24; second += 1) {
    const time = `1200${String(second).padStart(2, '0')}.00`;
    parts.push(`${sentence(gga(time))}\r\n`, ...defect(second, time));
    parts.push(`${sentence('GNGSA,A,3,13,16,21,15,10,,,,,,,,1.05,0.64,0.83,1')}\n`);
    parts.push(`${sentence('GNGSA,A,3,66,67,,,,,,,,,,,1.05,0.64,0.83,2')}\r\n`);
    parts.push(`${sentence('GNGSV,1,1,02,13,45,100,40,66,20,200,35,1')}\r\n`);
    if (second % 3 === 0) parts.push(`${sentence(rmc(time, '050826'))}\r\n`);
  }
  parts.push(sentence(gga('120024.00')).slice(0, 40));
  return new Uint8Array(Buffer.from(parts.join(''), 'latin1'));
}

function defect(second: number, time: string): string[] {
  const plain = sentence(`GNGST,${time},15,0.011,0.009,12.3,0.009,0.010,0.018`);
  const defects: readonly string[][] = [
    [plain.toLowerCase().replace('$gngst', '$GNGST'), '\r\n'],
    [plain, '\r\r\n'],
    ['\r\n\n', plain, '\n'],
    [`\\s:station1,c:1418169601*59\\${plain}\r\n`],
    [`2026-08-05 12:00:03.120 RX ${plain}\r\n`],
    [plain, ',1785931203120\r\n'],
    [`$GNGGA,${time},4807.03$GNGST,${time},15\r\n`],
    [plain, plain, '\r\n'],
    ['\u00d3\u0000\u0013\u003e\u00d0\u0000\u0003', plain, '\r\n'],
    [plain, '\u00d3\u0000\n\u0013\u00ff\r\n'],
    ['!AIVDM,1,1,,B,13aGa?P00PHfERNFruh0?vN289E,0*24\r\n'],
    [sentence('PXYZ,1,2,3'), '\r\n'],
    [plain.slice(0, -3), '\r\n'],
    [`${plain.slice(0, -2)}00\r\n`],
    ['# a comment\r\n', 'some text\r\n'],
    ['GNGST,1,2*33\r\n', '$GN\r\n', '$gngga,lower*00\r\n'],
    ['\u0000\u0001\u0002\u0003\u0004\n'],
    [sentence('GNGSV,1,1,02,13,45,100,x,66,20,200,35,1'), '\r\n'],
    [sentence('GNTXT,01,01,02,words with spaces'), '\r\n'],
    [sentence(`GNRMC,${time},A,48x7.0,N,01131.0,E,,,050826,,,A`), '\r\n'],
    [sentence('GNDTM,W84,,0.0,N,0.0,E,0.0,W84'), '\r\n'],
    [sentence(`GNGLL,4807.0,N,01131.0,E,${time},A,A`), '\r\n'],
    [sentence(`GNZDA,${time},05,08,2026,00,00`), '\r\n'],
    [sentence(gga(time, {talker: 'GP', quality: 1})), '\r\n'],
  ];
  return defects[second] ?? [];
}
