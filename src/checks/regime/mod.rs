//! Does the model suit the regime of the flow?
