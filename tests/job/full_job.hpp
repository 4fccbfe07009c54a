// SPDX-License-Identifier: MIT
#pragma once

#include <string>

namespace job_test {

/// A valid job in which every key of the format stands at least once (test_schema.cpp holds it to
/// that). Numbers are chosen to be told apart, not to be sensible.
inline const std::string full_job = R"json({
  // a comment
  "bismar": 1, /* another */
  "title": "every key once",
  "currency": "EUR",
  "rates": { "USD": "0.92 EUR" },
  "catalogue": {
    "materials": ["starter"],
    "stock": ["starter"],
    "routes": ["starter"],
    "finishes": ["starter"],
    "operations": ["starter"],
    "weld_zones": ["starter"]
  },
  "settings": {
    "missing": "exclude",
    "range_ends": { "price": "high", "yield strength": "mid" },
    "route_end": "low",
    "explain": "full",
    "epsilon": "0.5 %",
    "delta": 1e-5,
    "near": "10 %",
    "fold": 0.01,
    "doubtful_sizes": true,
    "kerf": "4 mm",
    "machining_allowance": "3 mm",
    "scrap_credit": "20 %"
  },
  "parts": [
    {
      "name": "first",
      "quantity": 2000,
      "batch": 500,
      "member": {
        "length": "400 mm",
        "shapes": [
          { "round": { "diameter": "10 mm..60 mm", "sizes": "R20" } },
          { "square": { "side": "10..60 mm", "sizes": { "step": "0.5 mm" } } },
          { "rectangle": { "height_to_width": 2, "height": "10 mm..60 mm",
                           "sizes": ["20 mm", "25 mm"] } },
          { "ellipse": { "height_to_width": 1.25, "sizes": "continuous" } },
          { "round_tube": { "wall_to_diameter": "10 %", "diameter": "1 in..2 in" } },
          { "rectangular_tube": { "height_to_width": 1.5, "wall_to_height": "0.02..8 %" } }
        ],
        "stock": ["round-bar", "chs"],
        "load_cases": [
          {
            "name": "all loads",
            "support": { "z": "cantilever", "y": "pinned" },
            "loads": [
              { "force": "655 N", "at": "300 mm", "along": "y" },
              { "moment": "-12 N.m", "at": "middle" },
              { "distributed": "2 kN/m", "distributed_to": "3 kN/m", "from": "100 mm", "to": "end" },
              { "axial": "-5 kN" },
              { "torque": "7 N.m", "at": "end" },
              { "from_preload": { "preload": "17.4 kip", "diameter": "12.7 mm",
                                  "torque_factor": 0.2 }, "at": "300 mm" }
            ],
            "factors": { "yield": 1.7 },
            "duration": "10 a",
            "hand_loaded": true,
            "impact": true
          },
          {
            "name": "direct",
            "support": "pinned",
            "direct": { "N": "-1 kN", "V_y": "2 N", "V_z": "3 N", "M_y": "4 N.m", "M_z": "5 N.m",
                        "T": "6 N.m" }
          }
        ]
      },
      "limits": {
        "deflection": "10 mm", "twist": "2 deg", "height": "60 mm", "width": "50 mm", "wall": "2 mm",
        "slenderness": 180, "column_method": "euler", "mass": "3 kg", "cost": "20 EUR",
        "routes": ["hot-forging"], "forbidden_routes": ["sand-casting"],
        "processes": ["machining"], "forms": ["bar", "forging"], "classes": ["steel", "aluminium"],
        "materials": ["s235jr-as-rolled"], "forbidden_materials": ["wood"],
        "properties": [
          { "property": "elongation", "at_least": "8 %" },
          { "property": "fracture toughness", "at_least": "50 MPa.m^0.5", "at_most": "0.2 GPa.m^0.5" }
        ],
        "medium": "fresh water", "corrosion_at_least": "fair", "temperature": "40 degC",
        "allow_brittle": true, "allow_hard": true
      },
      "finishes": ["none", "galvanising"],
      "operations": [{ "operation": "saw-cut", "units": 2 }],
      "service_class": 2
    },
    {
      "name": "every member",
      "member": {
        "length": "2 m",
        "shapes": [
          { "hexagon": { "width_across_flats": "10 mm..60 mm" } },
          { "elliptical_tube": { "height_to_width": "0.5..2", "wall_to_height": "6 %" } },
          { "i_section": { "height_to_width": 2, "web_to_height": 0.05, "flange_to_height": 0.08,
                           "root_radius_to_height": 0.03 } },
          { "channel": { "height_to_width": 2, "web_to_height": 0.06, "flange_to_height": 0.06 } },
          { "t_section": { "height_to_width": 1, "web_to_height": 0.1, "flange_to_height": 0.1 } },
          { "angle": { "height_to_width": 1.5, "wall_to_height": 0.1 } },
          { "polygon": { "outline": [["0 mm", "0 mm"], ["40 mm", "0 mm"], ["40 mm", "50 mm"],
                                     ["0 mm", "50 mm"]],
                         "holes": [[["10 mm", "10 mm"], ["30 mm", "10 mm"], ["30 mm", "40 mm"]]],
                         "height": "20 mm..90 mm" } }
        ],
        "load_cases": [
          {
            "name": "built in",
            "support": { "z": "fixed pinned", "y": "fixed" },
            "own_weight": true,
            "loads": [{ "force": "-1 kN", "at": "1 m" }],
            "eccentricity": "3 mm",
            "temperature_change": "-30 K",
            "restrained": true,
            "fatigue": { "cycles": 200000, "stress_ratio": 0 }
          },
          {
            "name": "overhanging",
            "support": { "z": "pinned", "y": "pinned" },
            "second_support": "1.5 m",
            "acceleration": { "z": "15 m/s2", "y": "2 m/s2" }
          }
        ],
        "details": {
          "net_area": "90 %", "net_modulus": 0.8, "k_t_axial": 2, "k_t_bending": 1.8,
          "k_t_torsion": 1.5, "notch_radius": "2 mm", "surface": "as forged",
          "reliability": "99.9 %", "criterion": "gerber", "detail_category": "80 MPa",
          "welded": true,
          "crack": { "kind": "surface", "depth": "1 mm", "half_length": "3 mm" },
          "masses": [{ "mass": "4 kg", "at": "end" }]
        }
      },
      "limits": {
        "shear_deflection": true, "rotation": "1 deg", "frequency": "8 Hz",
        "elongation": "1 mm", "lateral_restraint": true
      }
    }
  ],
  "exchange": { "mass": "0.5 EUR/kg..500 EUR/kg" }
}
)json";

/// The smallest valid job: a base for faults of one kind.
inline const std::string small_job = R"json({
  "bismar": 1,
  "parts": [
    {
      "name": "bar",
      "member": {
        "length": "300 mm",
        "shapes": [{ "round": {} }],
        "load_cases": [{ "support": "cantilever", "loads": [{ "force": "655 N", "at": "end" }] }]
      }
    }
  ]
}
)json";

/// `text` with its one occurrence of `from` replaced.
inline std::string with(std::string text, const std::string& from, const std::string& to) {
  const std::size_t at = text.find(from);
  if (at == std::string::npos || text.find(from, at + 1) != std::string::npos) {
    throw std::string("the text to replace must occur once: " + from);
  }
  return text.replace(at, from.size(), to);
}

}  // namespace job_test
