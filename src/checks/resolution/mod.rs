//! Does the mesh resolve it, and the run last?
