// convert
// chain
// judge
// show
