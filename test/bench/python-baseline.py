"""What a user of Python would do: parse every line, turn fixes into geocentric metres, mean and spread."""

import sys

import numpy
import pynmea2
import pyproj

to_geocentric = pyproj.Transformer.from_crs("EPSG:4979", "EPSG:4978", always_xy=True)
latitudes, longitudes, heights = [], [], []
with open(sys.argv[1], encoding="ascii", errors="replace") as log:
    for line in log:
        try:
            sentence = pynmea2.parse(line)
        except pynmea2.ParseError:
            continue
        if sentence.sentence_type == "GGA" and sentence.gps_qual:
            latitudes.append(sentence.latitude)
            longitudes.append(sentence.longitude)
            heights.append(float(sentence.altitude) + float(sentence.geo_sep))
x, y, z = to_geocentric.transform(longitudes, latitudes, heights)
for axis in (x, y, z):
    column = numpy.asarray(axis)
    print(f"{column.mean():.4f} {column.std(ddof=1):.4f}")
