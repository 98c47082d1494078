"""The questions a code of practice must answer: one `Protocol` a kind of question.

A check or a placer that takes one of these works with any rule set that satisfies it. The package
`is456` satisfies all of them, as a module: `rules: BondRules = is456`. Units are those of the rule
sets: mm, N, N/mm², degrees.
"""

from __future__ import annotations

from typing import Protocol

from detailer.values import Exposure, Required


class BondRules(Protocol):
    """How long a bar must be held, and what bends count for."""

    def bond_stress(self, fck: float, *, deformed: bool = True, compression: bool = False) -> float:
        """Return the design bond stress. [N/mm²]"""

    def development_length(self, dia: float, stress: float, bond: float) -> Required:
        """Return the embedment that develops a stress. [mm]"""

    def anchorage_value(self, dia: float, angle: float) -> float:
        """Return what a bend or hook counts for. [mm]"""

    def link_tail(self, dia: float, angle: float) -> Required:
        """Return the straight end that anchors a link. [mm]"""


class CurtailmentRules(Protocol):
    """Where bars may stop."""

    def cutoff_extension(self, d: float, dia: float) -> Required:
        """Return how far a bar goes on past its theoretical end. [mm]"""

    def cutoff_shear_limit(self, permitted: float) -> Required:
        """Return the shear up to which bars may stop in tension. [N]"""

    def cutoff_double_area_limit(self, permitted: float) -> Required:
        """Return that shear where the rest is twice what is needed. [N]"""

    def cutoff_extra_links(self, b: float, s: float, fy: float) -> Required:
        """Return the extra area of links along a stopped bar. [mm²]"""

    def cutoff_link_spacing(self, d: float, beta: float) -> Required:
        """Return the greatest spacing of links along a stopped bar. [mm]"""

    def positive_share(self, continuous: bool) -> Required:
        """Return the share of bottom steel that goes into a support. [-]"""

    def positive_embedment(self, ld: float) -> Required:
        """Return how far it goes into the support. [mm]"""

    def support_bond_length(self, m1: float, v: float, l0: float, *, confined: bool) -> Required:
        """Return the greatest development length at a simple support. [mm]"""

    def negative_share(self) -> Required:
        """Return the share of top steel that goes past the inflection. [-]"""

    def negative_extension(self, d: float, dia: float, clear_span: float) -> Required:
        """Return how far it goes past the inflection. [mm]"""


class LapRules(Protocol):
    """How bars are lapped."""

    def lap_length(self, dia: float, stress: float, bond: float, factor: float = 1.0) -> Required:
        """Return the lap in flexural tension. [mm]"""

    def lap_length_compression(self, dia: float, stress: float, bond: float) -> Required:
        """Return the lap in compression. [mm]"""

    def lap_factor(
        self,
        *,
        top_cast: bool,
        cover_least: float,
        corner: bool,
        gap_adjacent: float,
        dia: float,
    ) -> Required:
        """Return by how much a lap grows for its place. [-]"""

    def lap_straight(self, dia: float) -> Required:
        """Return the least straight length of a lap. [mm]"""

    def lap_stagger(self, lap: float) -> Required:
        """Return the centre distance of staggered laps. [mm]"""

    def lap_share(self) -> Required:
        """Return the share of bars lapped at a section. [-]"""


class SpacingRules(Protocol):
    """How far apart bars lie."""

    def min_clear_gap(self, dia_a: float, dia_b: float, aggregate: float) -> Required:
        """Return the least horizontal clear distance. [mm]"""

    def min_layer_gap(self, dia: float, aggregate: float) -> Required:
        """Return the least clear distance of two layers. [mm]"""

    def max_clear_gap(self, fy: float, redistribution: float = 0.0) -> Required:
        """Return the greatest clear distance near a tension face. [mm]"""


class CoverRules(Protocol):
    """How deep steel lies."""

    def nominal_cover(self, exposure: Exposure, fck: float, main_dia: float) -> Required:
        """Return the cover for durability. [mm]"""

    def fire_cover(self, hours: float, *, continuous: bool) -> Required:
        """Return the cover for fire. [mm]"""

    def fire_width(self, hours: float) -> Required:
        """Return the least width of a beam for fire. [mm]"""

    def cover_for_bar(self, dia: float) -> Required:
        """Return the cover for the bar's own size. [mm]"""


class SteelRules(Protocol):
    """How much steel, and which links hold it."""

    def min_tension_steel(self, b: float, d: float, fy: float) -> Required:
        """Return the least tension steel. [mm²]"""

    def max_steel(self, b: float, depth: float) -> Required:
        """Return the most steel of one face. [mm²]"""

    def needs_side_steel(self, web_depth: float, *, torsion: bool = False) -> bool:
        """Return whether the side faces need bars."""

    def side_steel(self, b: float, web_depth: float) -> Required:
        """Return the side-face steel, both faces together. [mm²]"""

    def side_steel_spacing(self, b: float) -> Required:
        """Return the greatest spacing of side-face bars. [mm]"""

    def compression_link_spacing(self, b: float, dia_bar: float) -> Required:
        """Return the greatest spacing of links that hold compression bars. [mm]"""

    def compression_link_dia(self, dia_bar: float) -> Required:
        """Return the least diameter of those links. [mm]"""

    def flange_tension_width(self, bf: float, span: float) -> Required:
        """Return the width over which tension steel of a flange lies. [mm]"""


class ShearRules(Protocol):
    """What concrete and links carry in shear and torsion."""

    def shear_strength(self, pt: float, fck: float) -> float:
        """Return the shear strength of concrete. [N/mm²]"""

    def max_shear_stress(self, fck: float) -> float:
        """Return the greatest shear stress, whatever the links. [N/mm²]"""

    def enhanced_shear(self, tau_c: float, d: float, av: float) -> float:
        """Return the shear strength close to a support. [N/mm²]"""

    def link_shear(self, asv: float, s: float, d: float, fy: float) -> float:
        """Return the shear that upright links carry. [N]"""

    def max_link_spacing(self, d: float) -> Required:
        """Return the greatest spacing of links. [mm]"""

    def min_link_area(self, b: float, s: float, fy: float) -> Required:
        """Return the least area of links at a spacing. [mm²]"""

    def torsion_shear(self, v: float, t: float, b: float) -> float:
        """Return the equivalent shear. [N]"""

    def torsion_moment(self, t: float, depth: float, b: float) -> float:
        """Return the moment that torsion adds. [N·mm]"""

    def torsion_link_spacing(self, x1: float, y1: float) -> Required:
        """Return the greatest spacing of links in torsion. [mm]"""


class FlexureRules(Protocol):
    """What a section carries in bending."""

    def xu_limit(self, fy: float) -> float:
        """Return the greatest depth of the neutral axis over d. [-]"""

    def steel_stress(self, strain: float, fy: float) -> float:
        """Return the design stress of steel at a strain. [N/mm²]"""

    def flange_depth(self, df: float, xu: float) -> float:
        """Return the depth over which a flange counts. [mm]"""

    def rectangle_moment(self, b: float, d: float, area: float, fck: float, fy: float) -> float:
        """Return the moment of an under-reinforced rectangle. [N·mm]"""

    def limit_moment(self, b: float, d: float, fck: float, fy: float) -> float:
        """Return the greatest moment of a singly reinforced rectangle. [N·mm]"""


class DeflectionRules(Protocol):
    """Span to depth."""

    def span_depth_basic(self, kind: str, span: float) -> float:
        """Return the basic ratio. [-]"""

    def service_stress(self, fy: float, required: float, provided: float) -> float:
        """Return the stress of steel under service loads. [N/mm²]"""

    def tension_factor(self, fs: float, pt: float) -> float:
        """Return the factor for tension steel. [-]"""

    def compression_factor(self, pc: float) -> float:
        """Return the factor for compression steel. [-]"""

    def flange_factor(self, width_ratio: float) -> float:
        """Return the factor for flanged beams. [-]"""


class DetailingRules(
    BondRules,
    CurtailmentRules,
    LapRules,
    SpacingRules,
    CoverRules,
    SteelRules,
    ShearRules,
    FlexureRules,
    DeflectionRules,
    Protocol,
):
    """Everything a beam asks of its code of practice."""
