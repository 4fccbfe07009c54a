// SPDX-License-Identifier: MIT
#pragma once

#include <array>

namespace bismar::mechanics {

/// The upper half of a channel: at each distance y from the back of the web, material from the
/// inner edge z_in(y) up to h/2. The inner edge is made of at most four smooth pieces (web, root
/// arc, flange face, toe arc); integrals over a piece use Gauss-Legendre points in the parameter in
/// which it is a polynomial or a short arc, which makes them exact to rounding.
class ChannelProfile {
 public:
  struct Dimensions {
    double height = 0.0;
    double width = 0.0;
    double web = 0.0;
    double flange = 0.0;
    double root_radius = 0.0;
    double flange_slope = 0.0;
  };
  struct Moments {
    double area = 0.0;
    double first_y = 0.0;       ///< About the back of the web.
    double first_z = 0.0;       ///< About mid-height.
    double second_y = 0.0;      ///< About the back of the web.
    double second_z = 0.0;      ///< About mid-height.
    double half_outline = 0.0;  ///< Length of the outline above mid-height.
  };

  explicit ChannelProfile(const Dimensions& dimensions);

  /// Whether the pieces follow each other from the web to the tip and stay above mid-height.
  [[nodiscard]] bool fits() const;
  [[nodiscard]] Moments moments() const;
  /// About the axis parallel to z that halves the area.
  [[nodiscard]] double plastic_modulus_z() const;
  /// Height at which the root arc leaves the web, from mid-height.
  [[nodiscard]] double web_end() const { return arcs_[0].centre_z; }
  /// Height of the flange's inner face, prolonged to the web's face, from mid-height.
  [[nodiscard]] double flange_face_at_web() const { return face(size_.web); }
  /// The same, unrounded, at a distance from the back of the web.
  [[nodiscard]] double flange_face_at(double y) const { return face(y); }

 private:
  struct Arc {
    double centre_y = 0.0;
    double centre_z = 0.0;
    double radius = 0.0;
  };
  /// A point of the inner edge, and how fast y and the edge's length grow with the parameter.
  struct EdgePoint {
    double y = 0.0;
    double z = 0.0;
    double dy = 0.0;
    double length = 0.0;
  };
  static constexpr int pieces = 4;

  [[nodiscard]] double face(double y) const;
  /// Piece 0 web, 1 root arc, 2 face, 3 toe arc; u from 0 to 1 along it.
  [[nodiscard]] EdgePoint at(int piece, double u) const;
  /// Adds area and first moment about the back of the web of piece k from 0 to u.
  void add_up_to(int piece, double u, double& area, double& first) const;

  Dimensions size_;
  double angle_ = 0.0;         ///< Of the flange's face.
  double measured_at_ = 0.0;   ///< Distance from the back at which `flange` is measured.
  std::array<Arc, 2> arcs_{};  ///< Root and toe.
  double face_from_ = 0.0;     ///< Where the root arc ends.
  double face_to_ = 0.0;       ///< Where the toe arc begins.
};

}  // namespace bismar::mechanics
