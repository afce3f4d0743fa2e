in[kg/s] out[kg/s]
13.34870 13.34843
