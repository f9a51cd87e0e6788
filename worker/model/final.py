"""The one final figure of a committed model: MNIST's 10,000 test digits, each drawn once into a cell at each level.

    /usr/bin/python3 worker/model/final.py --weights FILE

FILE is what train.py kept with --keep. The figure goes to card.json; nothing is ever tuned by it.
"""

import argparse
import json
from pathlib import Path

import torch

from cells import Generator
from digits import FINAL, load
from figures import LEVELS, digit_figures
from net import Net, folded

CARD = Path(__file__).resolve().parent / "card.json"


def main() -> None:
    options = argparse.ArgumentParser()
    options.add_argument("--weights", type=Path, required=True)
    given = options.parse_args()
    torch.set_num_threads(1)
    card = json.loads(CARD.read_text())
    torch.manual_seed(card["seed"] + 2)
    net = Net()
    net.load_state_dict(torch.load(given.weights)["mean"])
    use = folded(net.eval())
    source = Generator(*load("t10k", FINAL))
    card["final"] = {
        name: {k: round(v, 5) for k, v in digit_figures(use, source, card["temperature"], hardness).items()}
        for name, hardness in LEVELS.items()
    }
    CARD.write_text(json.dumps(card, indent=2) + "\n")
    print(json.dumps(card["final"], indent=2))


if __name__ == "__main__":
    main()
