"""Ionisation equilibrium of H, He I and He II with one electron density; vectorised, in the precision of the background."""

import numpy as np

import constants as K


class Saha:
    def __init__(self, background):
        b, num = background, background.setting.num
        self.b = b
        con = b.con
        self.thermal = 2 * b.pi * con["m_e"] * con["k"] / con["h"] ** 2
        self.kelvin = {key: con["h"] * b.c * num(v) * 100 / con["k"] for key, v in K.LEVEL.items()}

    def ratios(self, v):
        """S/n_H for H, He I, He II at v = ln(1+z)."""
        T = self.b.T * np.exp(v)
        n = self.b.n_H0 * np.exp(3 * v)
        G = (self.thermal * T) ** (self.b.setting.num(3) / 2) / n
        return (G * np.exp(-self.kelvin["H_limit"] / T), 4 * G * np.exp(-self.kelvin["He_limit"] / T),
                G * np.exp(-self.kelvin["HeII_limit"] / T))

    def fractions(self, v):
        """x_e, 1 - x_p, x_p, He+/He, He++/He, by bisection and then Newton on the charge balance in ln x."""
        s_H, s_1, s_2 = self.ratios(v)
        f = self.b.f_He

        def balance(x):
            q = x * x + s_1 * x + s_1 * s_2
            return s_H / (s_H + x) + f * (s_1 * x + 2 * s_1 * s_2) / q - x

        def slope(x):
            q = x * x + s_1 * x + s_1 * s_2
            p = s_1 * x + 2 * s_1 * s_2
            return -s_H / (s_H + x) ** 2 + f * (s_1 * q - p * (2 * x + s_1)) / q ** 2 - 1

        low = np.log(2 * s_H / (s_H + np.sqrt(s_H * s_H + 4 * s_H))) - 1  # below pure hydrogen
        low = np.maximum(low, -700)
        high = np.full_like(low, np.log(1 + 2 * f) + 1e-3)
        for _ in range(40):
            middle = (low + high) / 2
            above = balance(np.exp(middle)) > 0
            low, high = np.where(above, middle, low), np.where(above, high, middle)
        x = np.exp((low + high) / 2)
        for _ in range(4):
            x = x - balance(x) / slope(x)
        q = x * x + s_1 * x + s_1 * s_2
        return x, x / (s_H + x), s_H / (s_H + x), s_1 * x / q, s_1 * s_2 / q
