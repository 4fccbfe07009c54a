// SPDX-License-Identifier: MIT
/// Everything of bismar::core, lowest floor first. Jobs in JSON (bismar/job/...), the evolutionary
/// engine (bismar/evolve/...) and the Eigen bridge (bismar/eigen/...) are libraries of their own
/// and are included by name.
#pragma once

#include <bismar/error.hpp>
#include <bismar/version.hpp>

#include <bismar/quantity/currency.hpp>
#include <bismar/quantity/format.hpp>
#include <bismar/quantity/parse.hpp>

#include <bismar/pareto/dominance.hpp>
#include <bismar/pareto/front.hpp>

#include <bismar/solver/box_problem.hpp>
#include <bismar/solver/sensitivity.hpp>

#include <bismar/exchange/penalty.hpp>
#include <bismar/exchange/ruler.hpp>

#include <bismar/mechanics/aluminium.hpp>
#include <bismar/mechanics/beam.hpp>
#include <bismar/mechanics/beam_column.hpp>
#include <bismar/mechanics/bolt.hpp>
#include <bismar/mechanics/column.hpp>
#include <bismar/mechanics/corrosion.hpp>
#include <bismar/mechanics/cross_section_resistance.hpp>
#include <bismar/mechanics/endurance.hpp>
#include <bismar/mechanics/fatigue.hpp>
#include <bismar/mechanics/fracture.hpp>
#include <bismar/mechanics/lateral_torsional.hpp>
#include <bismar/mechanics/limit_state.hpp>
#include <bismar/mechanics/load_effects.hpp>
#include <bismar/mechanics/material_index.hpp>
#include <bismar/mechanics/member.hpp>
#include <bismar/mechanics/notch.hpp>
#include <bismar/mechanics/polygon.hpp>
#include <bismar/mechanics/scaled_section.hpp>
#include <bismar/mechanics/section.hpp>
#include <bismar/mechanics/section_builder.hpp>
#include <bismar/mechanics/section_properties.hpp>
#include <bismar/mechanics/section_trends.hpp>
#include <bismar/mechanics/shaft.hpp>
#include <bismar/mechanics/shear_area.hpp>
#include <bismar/mechanics/shear_coefficient.hpp>
#include <bismar/mechanics/stress.hpp>
#include <bismar/mechanics/temperature.hpp>
#include <bismar/mechanics/thin_wall.hpp>
#include <bismar/mechanics/timber.hpp>
#include <bismar/mechanics/torsion.hpp>
#include <bismar/mechanics/torsional_buckling.hpp>
#include <bismar/mechanics/vibration.hpp>
#include <bismar/mechanics/wall.hpp>
#include <bismar/mechanics/welded_detail.hpp>

#include <bismar/catalogue/catalogue.hpp>
#include <bismar/catalogue/odd_sizes.hpp>
#include <bismar/catalogue/preferred_sizes.hpp>
#include <bismar/catalogue/tolerance.hpp>

#include <bismar/sizing/cost.hpp>
#include <bismar/sizing/existence.hpp>
#include <bismar/sizing/front.hpp>
#include <bismar/sizing/index.hpp>
#include <bismar/sizing/study.hpp>

#include <bismar/report/pictures.hpp>
#include <bismar/report/text_report.hpp>
