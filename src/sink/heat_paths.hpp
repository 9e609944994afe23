#pragma once
// Where the heat goes: the sum over all paths is the whole of it.

namespace finwright::sink {

/// Heat leaving the sink by path [W].
template <class T>
struct HeatPaths {
    T channels = T(0.0);    ///< convection from fin faces and base strips between fins
    T outer_faces = T(0.0); ///< convection from the two outermost fin faces
    T tips_edges = T(0.0);  ///< convection from fin tips and the fins' end faces
    T rim = T(0.0);         ///< convection from the base's four narrow sides
    T bare = T(0.0);        ///< convection from base that looks past the fins
    T back = T(0.0);        ///< convection from the base's back beside the parts
    T radiation = T(0.0);   ///< from all of these
    T wall = T(0.0);        ///< conducted into the wall behind
    /// What of these would flow, at the air's temperature, to a wall and surroundings off it.
    T fixed = T(0.0);

    T total() const {
        return channels + outer_faces + tips_edges + rim + bare + back + radiation + wall;
    }
};

} // namespace finwright::sink
