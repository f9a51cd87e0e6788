"""Figures of a net on generated cells: accuracy, blank and void confusion, calibration."""

import torch

from cells import BLANK, VOID, Generator

LEVELS = {"clean": 0.0, "disturbed": 0.6, "hard": 1.0}


def logits_of(net: torch.nn.Module, cells: torch.Tensor) -> torch.Tensor:
    with torch.no_grad():
        return torch.cat([net(cells[i : i + 500]) for i in range(0, len(cells), 500)])


def every_digit(source: Generator, hardness: float | None, **shares: float) -> tuple[torch.Tensor, torch.Tensor]:
    """One cell of each digit of the source, in chunks; hardness None draws it anew for each cell."""
    cells, labels = [], []
    for start in range(0, len(source.images), 500):
        pick = torch.arange(start, min(start + 500, len(source.images)))
        hard = torch.rand(len(pick)) if hardness is None else torch.full((len(pick),), hardness)
        x, y = source.batch(pick, hard, **shares)
        cells.append(x)
        labels.append(y)
    return torch.cat(cells), torch.cat(labels)


def calibration_error(p: torch.Tensor, labels: torch.Tensor, bins: int = 15) -> float:
    """Expected calibration error over equal bins of the highest probability."""
    best, choice = p.max(1)
    right = (choice == labels).float()
    place = (best * bins).long().clamp(max=bins - 1)
    total = 0.0
    for k in range(bins):
        rows = place == k
        if rows.any():
            total += abs(best[rows].mean() - right[rows].mean()).item() * rows.float().mean().item()
    return total


SECOND_LOOK_BELOW = 0.995
SHIFTS = ((1, 0), (-1, 0), (0, 1), (0, -1))


def shifted(cells: torch.Tensor, right: int, down: int) -> torch.Tensor:
    """Cells cut a pixel off, their edge repeated."""
    padded = torch.nn.functional.pad(cells, (1, 1, 1, 1), mode="replicate")
    return padded[:, :, 1 + down : 41 + down, 1 + right : 33 + right]


def second_look(net: torch.nn.Module, cells: torch.Tensor, labels: torch.Tensor, temperature: float) -> dict[str, float]:
    """Cells that are not sure are looked at again, cut a pixel off to each side; the temperature of the mean of all five."""
    logits = logits_of(net, cells)
    unsure = torch.softmax(logits / temperature, 1).max(1).values < SECOND_LOOK_BELOW
    again = torch.stack([logits[unsure]] + [logits_of(net, shifted(cells[unsure], *shift)) for shift in SHIFTS]).mean(0)
    second = temperature_of(again, labels[unsure])
    loss = torch.nn.functional.cross_entropy
    return {
        "below": SECOND_LOOK_BELOW,
        "temperature": round(second, 2),
        "share": round(unsure.float().mean().item(), 4),
        "rightBefore": round((logits[unsure].argmax(1) == labels[unsure]).float().mean().item(), 4),
        "rightAfter": round((again.argmax(1) == labels[unsure]).float().mean().item(), 4),
        "lossBefore": round(loss(logits[unsure] / temperature, labels[unsure]).item(), 4),
        "lossAfter": round(loss(again / second, labels[unsure]).item(), 4),
    }


def temperature_of(logits: torch.Tensor, labels: torch.Tensor) -> float:
    """The temperature with the least cross-entropy, by a fine search."""
    grid = [0.5 + 0.01 * k for k in range(151)]
    return min(grid, key=lambda t: torch.nn.functional.cross_entropy(logits / t, labels).item())


def digit_figures(net: torch.nn.Module, source: Generator, temperature: float, hardness: float) -> dict[str, float]:
    x, y = every_digit(source, hardness, blank=0, void=0, style=0)
    p = torch.softmax(logits_of(net, x) / temperature, 1)
    best, choice = p.max(1)
    right = choice == y
    return {
        "digits": len(y),
        "digitAccuracy": right.float().mean().item(),
        "digitTakenAsVoid": (choice == VOID).float().mean().item(),
        "digitTakenAsBlank": (choice == BLANK).float().mean().item(),
        "shareAbove0.99": (best > 0.99).float().mean().item(),
        "wrongAbove0.99": int(((best > 0.99) & ~right).sum()),
    }


def figures(net: torch.nn.Module, source: Generator, temperature: float) -> dict[str, dict[str, float]]:
    out: dict[str, dict[str, float]] = {}
    for name, hardness in LEVELS.items():
        row = digit_figures(net, source, temperature, hardness)
        for label, shares, key in ((VOID, {"void": 1.0, "blank": 0.0}, "void"), (BLANK, {"void": 0.0, "blank": 1.0}, "blank")):
            x, y = every_digit(source, hardness, style=0, **shares)
            p = torch.softmax(logits_of(net, x) / temperature, 1)
            row[f"{key}Recall"] = (p.argmax(1) == label).float().mean().item()
            row[f"{key}TakenAsDigitAbove0.9"] = (p[:, :10].max(1).values > 0.9).float().mean().item()
        x, y = every_digit(source, hardness)
        row["calibrationError"] = calibration_error(torch.softmax(logits_of(net, x) / temperature, 1), y)
        out[name] = {k: round(v, 5) for k, v in row.items()}
    return out
